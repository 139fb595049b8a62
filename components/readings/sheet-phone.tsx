"use client";

import { Button } from "@/components/ui/button";
import { DemoBadge } from "@/components/ui/demo-badge";
import { AddNote } from "./add-note";
import { PhoneNote } from "./phone-note";
import { rowState } from "./row-state";
import { ChoosingRibbon, type SheetInstrument } from "./sheet-about";
import { Exports } from "./sheet-foot";
import { emptyRow } from "./sheet-row";
import { ReadOnlyWords, TurnPartials, UnitChoice } from "./sheet-tools";
import { placeOf } from "./sheet-typing";
import type { OpenSheet } from "./use-open-sheet";

type Props = {
  sheet: OpenSheet;
  sheetId: string;
  instrument: SheetInstrument;
  demo: boolean;
  whyReadOnly: string | null;
  back: { href: string; label: string };
  kept: React.ReactNode;
  sheetActions: React.ReactNode;
};

/** The sheet on the phone: the note in hand fills the page, and what is done seldom stands under it. */
export function SheetPhone({
  sheet,
  sheetId,
  instrument,
  demo,
  whyReadOnly,
  back,
  kept,
  sheetActions,
}: Props) {
  const { reading, order, keys, chooseKey } = sheet;
  const { state, dispatch } = reading;
  const canChange = whyReadOnly === null;
  const addNote = <AddNote range={sheet.range} onChoose={(midi) => chooseKey?.(midi)} />;
  const key = (state.open && order.includes(state.open) ? state.open : null) ?? order[0];
  if (key === undefined) return <div className="pt-4">{canChange ? addNote : "Nothing read yet."}</div>;
  const row = state.rows[key] ?? emptyRow(placeOf(key));
  const live = reading.liveOf(row);
  return (
    <PhoneNote
      prefix="p-"
      row={row}
      live={live}
      flag={sheet.flags.get(row.place.midi) ?? null}
      state={rowState(row, live, state.referenceHz)}
      order={order}
      columns={sheet.columns.phone}
      unit={state.unit}
      referenceHz={state.referenceHz}
      canChange={canChange}
      cells={sheet.cells.phone}
      actions={sheet.actions}
      back={back}
      kept={kept}
      ribbon={
        <ChoosingRibbon instrument={instrument} keys={keys} onChoose={chooseKey} height={36} labels={false} />
      }
      tools={
        <>
          <ReadOnlyWords why={whyReadOnly} />
          <div className="flex flex-wrap items-center gap-3">
            <UnitChoice sheet={sheet} />
            {canChange ? <Button onClick={() => sheet.pasting.open()}>Paste</Button> : null}
            <TurnPartials sheet={sheet} where="phone" />
          </div>
          {canChange ? addNote : null}
          <div className="flex flex-wrap items-center gap-3">
            <Exports sheetId={sheetId} />
            {sheetActions}
            {demo ? <DemoBadge /> : null}
          </div>
        </>
      }
      onGo={(next) => {
        dispatch(
          state.rows[next]
            ? { type: "open", key: next }
            : { type: "choose", place: placeOf(next), atEnd: true },
        );
        window.scrollTo({ top: 0 });
      }}
    />
  );
}
