"use client";

import { useMemo, useState } from "react";
import { centsWithBand, signed } from "@/components/charts/format";
import { KeyPlots } from "@/components/charts/key-plots";
import { Readout } from "@/components/charts/readout";
import { Select } from "@/components/forms/select";
import { planFrom, plannedKeyboard, type RegisterStyle, styleFromRegisters } from "@/lib/acoustics";
import type { KeyboardResult } from "@/lib/acoustics/types";
import type { PreviewInstrument } from "@/lib/plans/schema";
import { keyboardInput } from "@/lib/readings/rules";
import { movedAt, movedPlot, previewPlot } from "./preview-plots";

/** What pianos are like, before any is measured. */
const TYPICAL = "typical";
const typicalPiano = { firstMidi: 21, lastMidi: 108, breakMidi: null, observations: [] };

/** Null where weights that tie no key to another determine no plan. */
function planOf(curve: KeyboardResult, style: RegisterStyle, firstMidi: number, lastMidi: number) {
  try {
    return planFrom(curve, { style: styleFromRegisters(style, firstMidi, lastMidi) });
  } catch {
    return null;
  }
}

type Props = {
  /** As typed; null while it is no style. */
  style: RegisterStyle | null;
  /** What it is held against, and how that is called in a sentence. */
  before: { style: RegisterStyle; name: string };
  instruments: readonly PreviewInstrument[];
};

/** Computed in the browser at every change, by the code the server plans with, on an instrument of the shop's own. */
export function StylePreview({ style, before, instruments }: Props) {
  const [cursor, setCursor] = useState(69);
  const [chosenId, setChosenId] = useState(instruments[0]?.instrumentId ?? TYPICAL);
  const chosen = instruments.find(({ instrumentId }) => instrumentId === chosenId);
  const { firstMidi, lastMidi, breakMidi, observations } = chosen ?? typicalPiano;
  const curve = useMemo(
    () => plannedKeyboard(keyboardInput(observations, { firstMidi, lastMidi, breakMidi })).planned,
    [observations, firstMidi, lastMidi, breakMidi],
  );
  const held = useMemo(
    () => planOf(curve, before.style, firstMidi, lastMidi),
    [curve, before.style, firstMidi, lastMidi],
  );
  const plan = useMemo(
    () => style && planOf(curve, style, firstMidi, lastMidi),
    [curve, style, firstMidi, lastMidi],
  );
  const plots = useMemo(
    () => (plan && held ? [previewPlot(plan, held, before.name), movedPlot(plan, held, before.name)] : []),
    [plan, held, before.name],
  );
  const index = plan?.notes.findIndex(({ midi }) => midi === cursor) ?? -1;
  const note = plan?.notes[index] ?? plan?.notes[0];

  return (
    <section aria-label="Preview" className="grid gap-3">
      <div className="flex flex-wrap items-end gap-x-6 gap-y-2">
        <Select
          label="Tried on"
          className="w-full sm:w-96"
          value={chosen ? chosenId : TYPICAL}
          onChange={(event) => setChosenId(event.target.value)}
          options={[
            ...instruments.map(({ instrumentId, name, notesRead }) => ({
              value: instrumentId,
              label: `${name}, ${notesRead === 1 ? "1 note" : `${notesRead} notes`} read`,
            })),
            { value: TYPICAL, label: "A typical piano, none of its notes read" },
          ]}
        />
        <p className="lab min-w-0 flex-1 basis-64 pb-1">{sourceWords(chosen, instruments.length)}</p>
      </div>
      {plan && held && note ? (
        <KeyPlots
          range={{ firstMidi, lastMidi, breakMidi: curve.breakMidi }}
          plots={plots}
          cursor={note.midi}
          onCursor={setCursor}
        >
          <Readout
            midi={note.midi}
            about={chosen?.name ?? "a typical piano"}
            cells={[
              {
                key: "stretch",
                label: "Stretch, cents",
                value: centsWithBand(note.stretchCents, note.bandCents),
                width: 160,
              },
              {
                key: "moved",
                label: "Moved, cents",
                value: signed(movedAt(plan, held, plan.notes.indexOf(note)), 2),
                width: 140,
              },
            ]}
          />
        </KeyPlots>
      ) : (
        <p role="status" className="py-4 text-ink-soft">
          These weights do not determine a plan yet: give an octave some weight in every register.
        </p>
      )}
    </section>
  );
}

function sourceWords(chosen: PreviewInstrument | undefined, offered: number): string {
  if (chosen) return `Drawn from its fullest reading sheet, ${chosen.sheetName}.`;
  if (offered > 0) return "What pianos are like, not one of yours: hence the wide band.";
  return "The shop has no reading sheet yet, so this is what pianos are like, not one of yours.";
}
