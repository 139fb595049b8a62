"use client";

import { WorkHead } from "@/components/shell/spread";
import { Button } from "@/components/ui/button";
import { DemoBadge } from "@/components/ui/demo-badge";
import { EmptyState } from "@/components/ui/states";
import { AddNote } from "./add-note";
import { ownErrorWords } from "./fit-words";
import { ChoosingRibbon, type SheetInstrument } from "./sheet-about";
import { Exports, KeyWords } from "./sheet-foot";
import { SheetTable } from "./sheet-table";
import { NextStep, ReadOnlyWords, TurnPartials, UnitChoice } from "./sheet-tools";
import type { OpenSheet } from "./use-open-sheet";

type Props = {
  sheet: OpenSheet;
  sheetId: string;
  instrument: SheetInstrument;
  demo: boolean;
  whyReadOnly: string | null;
  /** Typing begins at the field for the first note. */
  beginHere: boolean;
  sheetActions: React.ReactNode;
};

/** The sheet as a table, on the desk and on a tablet. */
export function SheetDesk({ sheet, sheetId, instrument, demo, whyReadOnly, beginHere, sheetActions }: Props) {
  const { reading, keys, chooseKey, order, steps } = sheet;
  const canChange = whyReadOnly === null;
  return (
    <div ref={sheet.box} className="max-sm:hidden print:block">
      <WorkHead
        title="Readings"
        summary={`${
          reading.state.unit === "hz" ? "Frequencies in Hz." : "Cents from the nth harmonic."
        } Dots: distance from the fitted curve.`}
        actions={
          <>
            <UnitChoice sheet={sheet} />
            {canChange ? <Button onClick={() => sheet.pasting.open()}>Paste</Button> : null}
            <NextStep sheet={sheet} instrumentId={instrument.id} sheetId={sheetId} />
          </>
        }
      />
      {canChange ? null : (
        <div className="mb-3">
          <ReadOnlyWords why={whyReadOnly} />
        </div>
      )}
      <div className="mb-3 hidden sm:max-lg:block" data-no-print>
        <ChoosingRibbon instrument={instrument} keys={keys} onChoose={chooseKey} height={36} labels />
      </div>
      {order.length === 0 && (!canChange || steps) ? (
        <EmptyState title="No notes read yet">
          {canChange
            ? "Add a note below, press a key on the ribbon, or paste rows from a spreadsheet."
            : "Nothing has been read on this sheet."}
        </EmptyState>
      ) : (
        <SheetTable
          prefix="t-"
          sheet={reading}
          width={sheet.width}
          cells={sheet.cells.table}
          columns={sheet.columns.table}
          unit={reading.state.unit}
          canChange={canChange}
          suggestion={sheet.suggestion}
          flags={sheet.flags}
          actions={sheet.actions}
        />
      )}
      <div className="mt-3 flex flex-wrap items-center gap-x-5 gap-y-3" data-no-print>
        {canChange ? (
          <AddNote range={sheet.range} onChoose={(midi) => chooseKey?.(midi)} beginHere={beginHere} />
        ) : null}
        {canChange ? <KeyWords /> : null}
        <span className="ml-auto flex items-center gap-3">
          <TurnPartials sheet={sheet} where="table" />
          {demo ? <DemoBadge /> : null}
        </span>
      </div>
      {order.length > 0 ? <p className="lab mt-3">{ownErrorWords}</p> : null}
      <div
        className="mt-6 flex flex-wrap items-center gap-x-4 gap-y-2 border-t border-hairline pt-3"
        data-no-print
      >
        <Exports sheetId={sheetId} />
        <span className="ml-auto flex gap-1">{sheetActions}</span>
      </div>
    </div>
  );
}
