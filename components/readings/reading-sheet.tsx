"use client";

import { RightPage, Spread } from "@/components/shell/spread";
import type { SheetRecord } from "@/lib/readings/schema";
import { stageWords } from "@/lib/readings/stage-words";
import { Announcer } from "./announcer";
import { KeptWord } from "./kept-word";
import { PasteDialog } from "./paste-dialog";
import { rowState } from "./row-state";
import { type Clock, SheetAbout, type SheetInstrument } from "./sheet-about";
import { SheetDesk } from "./sheet-desk";
import { SheetPhone } from "./sheet-phone";
import { useOpenSheet } from "./use-open-sheet";

type Props = {
  sheet: SheetRecord;
  instrument: SheetInstrument;
  clock: Clock;
  /** Why this person may only read the sheet; null when they may write. */
  whyReadOnly: string | null;
  /** The note to begin at, from the address. */
  beginAt: number | null;
  tabs: React.ReactNode;
  /** Circumstances and archive, from the server's side. */
  sheetActions: React.ReactNode;
};

/** The open sheet: what it is on the left, the readings on the right; on the phone one note a page. */
export function ReadingSheet({
  sheet: given,
  instrument,
  clock,
  whyReadOnly,
  beginAt,
  tabs,
  sheetActions,
}: Props) {
  const sheet = useOpenSheet({ sheet: given, instrument, canChange: whyReadOnly === null, beginAt });
  const { reading, openRow, pasting, chooseKey } = sheet;
  const { state } = reading;
  const openLive = openRow && reading.liveOf(openRow);
  const openState = openRow && openLive && rowState(openRow, openLive, state.referenceHz);
  const kept = (
    <KeptWord rows={sheet.rows} unsaved={reading.unsaved} savedAt={reading.savedAt} clock={clock} />
  );
  const page = { sheet, sheetId: given.id, instrument, demo: clock.demo, whyReadOnly, sheetActions };

  return (
    <Spread
      left={
        <div className="contents max-sm:hidden">
          <SheetAbout
            sheet={reading.sheet}
            instrument={instrument}
            clock={clock}
            kept={kept}
            notesRead={sheet.readKeys.size}
            keys={sheet.keys}
            steps={sheet.steps}
            enough={sheet.enough}
            onChoose={chooseKey}
          />
        </div>
      }
      right={
        <RightPage className="max-sm:pb-40">
          <div className="max-sm:hidden">{tabs}</div>
          <Announcer row={openRow} live={openLive} state={openState} />
          <SheetDesk {...page} beginHere={beginAt === null && given.notes.length === 0} />
          <div className="sm:hidden print:hidden">
            <SheetPhone
              {...page}
              kept={kept}
              back={{
                href: `/instruments/${instrument.id}/sheets`,
                label: `${instrument.name}, ${stageWords[given.stage]}`,
              }}
            />
          </div>
          {pasting.isOpen ? (
            <PasteDialog
              open
              text={pasting.text}
              onText={pasting.setText}
              unit={state.unit}
              range={sheet.range}
              referenceHz={state.referenceHz}
              taken={sheet.readKeys}
              onClose={pasting.close}
              onRows={sheet.enterRows}
            />
          ) : null}
        </RightPage>
      }
    />
  );
}
