import { fixed, inharmonicity, percentWithBand, signedCents } from "@/components/charts/format";
import { noteText } from "@/components/charts/note-spelling";
import type { KeyPlot, KeyValue } from "@/components/charts/plot-types";
import type { ComparisonRecord } from "@/lib/plans/compare/schema";

type Note = ComparisonRecord["notes"][number];
type Side = ComparisonRecord["before"];

const verdictWords: Record<Note["verdict"], string> = {
  unchanged: "unchanged within error",
  changed: "changed",
  "not-comparable": "not comparable",
};

const reasonWords: Record<NonNullable<Note["reason"]>, string> = {
  "not-read-before": "not read before",
  "not-read-after": "not read this time",
  "different-string": "another string was read",
  "too-few-matched-partials": "too few partials in common: measure again",
  "b-not-positive": "B not above zero: measure again",
};

/** Relative change of B in per cent, from a change of its logarithm. */
export function percentOf(deltaLnB: number): number {
  return 100 * (Math.exp(deltaLnB) - 1);
}

/** One wire size moves B by about 12 %: a smaller change than this is not a change of wire. */
const WIRE_CHANGE = 0.08;

export function verdictOf(note: Note): string {
  if (note.verdict === "not-comparable") return reasonWords[note.reason ?? "too-few-matched-partials"];
  if (note.verdict === "unchanged") return verdictWords.unchanged;
  const change = percentOf(note.deltaLnB ?? 0);
  if (Math.abs(change) < 100 * WIRE_CHANGE) return "changed a little: read it again";
  return change > 0 ? "changed: stiffer. Wire changed?" : "changed: less stiff. Wire changed?";
}

function measured(side: Side): KeyValue[] {
  return side.notes.flatMap(({ midi, b }) => (b !== null && b > 0 ? [{ midi, value: b }] : []));
}

export function overlayPlot(comparison: ComparisonRecord, names: { before: string; after: string }): KeyPlot {
  const before = measured(comparison.before);
  const after = measured(comparison.after);
  const byKey = new Map(comparison.after.notes.map((note) => [note.midi, note]));
  return {
    id: "overlay",
    title: "B",
    axis: { kind: "log" },
    layers: [
      { kind: "visit", age: "older", name: names.before, curve: before, measured: before },
      { kind: "visit", age: "newer", name: names.after, curve: after, measured: after },
    ],
    table: {
      columns: [
        { key: "before", label: `${names.before}, B × 10−4` },
        { key: "after", label: `${names.after}, B × 10−4` },
      ],
      rows: comparison.before.notes.map(({ midi, b }) => {
        const other = byKey.get(midi)?.b ?? null;
        return {
          midi,
          cells: [
            { text: inharmonicity(b), copy: b === null ? "" : String(b * 1e4) },
            { text: inharmonicity(other), copy: other === null ? "" : String(other * 1e4) },
          ],
        };
      }),
    },
  };
}

function halfPercent(note: Note): number | null {
  if (note.low === null || note.high === null) return null;
  return (percentOf(note.high) - percentOf(note.low)) / 2;
}

export function changePlot(comparison: ComparisonRecord): KeyPlot {
  const comparable = comparison.notes.filter((note) => note.deltaLnB !== null);
  const value = (note: Note) => percentOf(note.deltaLnB ?? 0);
  const changed = comparable.filter((note) => note.verdict === "changed");
  return {
    id: "change",
    title: "Change of B at the same pitch, %",
    axis: { kind: "symmetric", atLeast: 20 },
    layers: [
      {
        kind: "band",
        name: "95 % band",
        points: comparable.flatMap((note) =>
          note.low !== null && note.high !== null
            ? [{ midi: note.midi, low: percentOf(note.low), high: percentOf(note.high) }]
            : [],
        ),
      },
      {
        kind: "marks",
        mark: "measured",
        name: "unchanged within error",
        stems: true,
        points: comparable
          .filter((note) => note.verdict === "unchanged")
          .map((note) => ({ midi: note.midi, value: value(note) })),
      },
      ...(changed.length > 0
        ? [
            {
              kind: "flagged" as const,
              name: "changed",
              stems: true,
              points: changed.map((note) => ({
                midi: note.midi,
                value: value(note),
                words: [
                  `${noteText(note.midi)} changed`,
                  `${percentWithBand(value(note), halfPercent(note))}`,
                ],
              })),
            },
          ]
        : []),
    ],
    table: {
      columns: [
        { key: "change", label: "change of B" },
        { key: "pitch", label: "pitch, cents" },
        { key: "detectable", label: "smallest change seen" },
        { key: "verdict", label: "verdict" },
      ],
      rows: comparison.notes.map((note) => ({
        midi: note.midi,
        cells: [
          { text: note.deltaLnB === null ? "–" : percentWithBand(value(note), halfPercent(note)) },
          { text: signedCents(note.pitchCents) },
          { text: note.detectableChange === null ? "–" : `${fixed(100 * note.detectableChange, 0)} %` },
          { text: verdictOf(note) },
        ],
      })),
    },
  };
}

export function pitchPlot(
  { before, after }: ComparisonRecord,
  names: { before: string; after: string },
): KeyPlot {
  const earlier = before.pitch.map(({ midi, cents }) => ({ midi, value: cents }));
  const later = after.pitch.map(({ midi, cents }) => ({ midi, value: cents }));
  const laterByKey = new Map(later.map((note) => [note.midi, note.value]));
  return {
    id: "pitch",
    title: "Pitch, cents",
    axis: { kind: "symmetric", atLeast: 10 },
    height: 160,
    phoneHeight: 120,
    layers: [
      { kind: "visit", age: "older", name: names.before, curve: earlier, measured: earlier },
      { kind: "visit", age: "newer", name: names.after, curve: later, measured: later },
    ],
    table: {
      columns: [
        { key: "before", label: names.before },
        { key: "after", label: names.after },
      ],
      rows: earlier.map(({ midi, value }) => ({
        midi,
        cells: [{ text: signedCents(value) }, { text: signedCents(laterByKey.get(midi)) }],
      })),
    },
  };
}
