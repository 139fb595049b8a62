"use client";

import { useMemo, useState } from "react";
import { centsWithBand, fixed } from "@/components/charts/format";
import { KeyPlots } from "@/components/charts/key-plots";
import { noteText } from "@/components/charts/note-spelling";
import type { KeyPlot } from "@/components/charts/plot-types";
import { Readout } from "@/components/charts/readout";
import { keyboard, planFrom, type RegisterStyle, styleFromRegisters } from "@/lib/acoustics";
import type { StretchResult } from "@/lib/acoustics/types";

const firstMidi = 21;
const lastMidi = 108;
/** What pianos are like, before any is measured: the same curve for every preview. */
const typical = keyboard({ observations: [], firstMidi, lastMidi });

function previewPlot(plan: StretchResult, even: StretchResult): KeyPlot {
  return {
    id: "preview",
    title: "Stretch, cents",
    axis: { kind: "symmetric", atLeast: 20 },
    height: 240,
    layers: [
      {
        kind: "curve",
        name: "this style, 95 % band",
        points: plan.notes.map(({ midi, stretchCents, bandCents }) => ({
          midi,
          value: stretchCents,
          low: stretchCents - (bandCents ?? 0),
          high: stretchCents + (bandCents ?? 0),
        })),
      },
      {
        kind: "visit",
        age: "older",
        name: "Even, built in",
        curve: even.notes.map(({ midi, stretchCents }) => ({ midi, value: stretchCents })),
        measured: [],
      },
    ],
    labels: [plan.notes[0], plan.notes.at(-1)].flatMap((note) =>
      note
        ? [
            {
              midi: note.midi,
              value: note.stretchCents,
              lines: [`${noteText(note.midi)} ${centsWithBand(note.stretchCents, note.bandCents)}`],
            },
          ]
        : [],
    ),
    table: {
      columns: [
        { key: "this", label: "this style, cents" },
        { key: "even", label: "Even, cents" },
      ],
      rows: plan.notes.map((note, index) => ({
        midi: note.midi,
        cells: [{ text: fixed(note.stretchCents, 2) }, { text: fixed(even.notes[index]?.stretchCents, 2) }],
      })),
    },
  };
}

/** Computed in the browser at every change, by the code the server plans with. */
export function StylePreview({ style }: { style: RegisterStyle | null }) {
  const [cursor, setCursor] = useState(69);
  const even = useMemo(() => planFrom(typical, { style: "even" }), []);
  const plan = useMemo(() => {
    if (!style) return null;
    try {
      return planFrom(typical, { style: styleFromRegisters(style, firstMidi, lastMidi) });
    } catch {
      // Weights that tie no key to another determine no plan; the form says so when it is saved.
      return null;
    }
  }, [style]);
  const plots = useMemo(() => (plan ? [previewPlot(plan, even)] : []), [plan, even]);
  const note = plan?.notes.find(({ midi }) => midi === cursor);
  if (!plan || !note) {
    return (
      <p role="status" className="py-4 text-ink-soft">
        These weights do not determine a plan yet: give an octave some weight in every register.
      </p>
    );
  }
  return (
    <KeyPlots
      range={{ firstMidi, lastMidi, breakMidi: typical.breakMidi }}
      plots={plots}
      cursor={cursor}
      onCursor={setCursor}
    >
      <Readout
        midi={cursor}
        about="a typical piano"
        cells={[
          {
            key: "stretch",
            label: "Stretch, cents",
            value: centsWithBand(note.stretchCents, note.bandCents),
          },
        ]}
      />
    </KeyPlots>
  );
}
