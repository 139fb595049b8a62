import { centsWithBand, fixed, signed } from "@/components/charts/format";
import { noteText } from "@/components/charts/note-spelling";
import type { KeyPlot } from "@/components/charts/plot-types";
import type { StretchResult } from "@/lib/acoustics/types";

/** The plan that a style as typed makes, over the one it is held against. */
export function previewPlot(plan: StretchResult, before: StretchResult, beforeName: string): KeyPlot {
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
        { key: "before", label: `${beforeName}, cents` },
        { key: "moved", label: "moved, cents" },
      ],
      rows: plan.notes.map((note, index) => ({
        midi: note.midi,
        cells: [
          { text: signed(note.stretchCents, 2) },
          { text: signed(before.notes[index]?.stretchCents, 2) },
          { text: signed(movedAt(plan, before, index), 2) },
        ],
      })),
    },
  };
}

export function movedAt(plan: StretchResult, before: StretchResult, index: number): number {
  return (plan.notes[index]?.stretchCents ?? 0) - (before.notes[index]?.stretchCents ?? 0);
}

/** By how much: two curves a cent apart cannot be told from each other on the plan's own scale. */
export function movedPlot(plan: StretchResult, before: StretchResult, beforeName: string): KeyPlot {
  const points = plan.notes.map(({ midi }, index) => ({ midi, value: movedAt(plan, before, index) }));
  const widest = points.reduce(
    (most, point) => (Math.abs(point.value) > Math.abs(most.value) ? point : most),
    points[0] ?? { midi: 69, value: 0 },
  );
  return {
    id: "moved",
    title: `Moved from ${beforeName}, cents`,
    axis: { kind: "symmetric", atLeast: 2 },
    height: 112,
    phoneHeight: 96,
    layers: [{ kind: "visit", age: "newer", curve: points, measured: [] }],
    labels:
      Math.abs(widest.value) < 0.05
        ? []
        : [
            {
              ...widest,
              lines: [`${noteText(widest.midi)} ${signed(widest.value, 1)}`],
            },
          ],
    table: {
      columns: [{ key: "moved", label: "moved, cents" }],
      rows: points.map(({ midi, value }) => ({
        midi,
        cells: [{ text: signed(value, 2), copy: fixed(value, 3) }],
      })),
    },
  };
}
