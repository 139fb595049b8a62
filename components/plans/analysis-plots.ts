import { fixed, inharmonicity, signed, signedCents } from "@/components/charts/format";
import type { KeyMark } from "@/components/charts/key-mark";
import { noteText } from "@/components/charts/note-spelling";
import type { FlaggedPoint, KeyPlot, KeyValue } from "@/components/charts/plot-types";
import type { AnalysisRecord } from "@/lib/plans/schema";

type Key = AnalysisRecord["keys"][number];

export function flaggedKeys(analysis: AnalysisRecord): Key[] {
  return analysis.keys.filter((key) => key.flag !== null);
}

/** "44 % above its neighbours, z = 4.5." */
export function flagWords(key: Key): string {
  if (key.expectedB === null || key.z === null) return "Off the curve of its neighbours.";
  const percent = 100 * (key.b / key.expectedB - 1);
  const side = percent > 0 ? "above" : "below";
  return `${Math.abs(percent).toFixed(0)} % ${side} its neighbours, z = ${fixed(key.z, 1)}.`;
}

export function keyMarks(analysis: AnalysisRecord): KeyMark[] {
  const next = analysis.advice.enough ? [] : analysis.advice.next.slice(0, 3);
  return [
    ...analysis.keys
      .filter((key) => key.source === "measured")
      .map((key): KeyMark => ({ midi: key.midi, kind: key.flag === null ? "measured" : "flagged" })),
    ...next.map(({ midi }): KeyMark => ({ midi, kind: "next" })),
  ];
}

function point(key: Key): KeyValue {
  return { midi: key.midi, value: key.b };
}

function flaggedPoint(key: Key): FlaggedPoint {
  return {
    ...point(key),
    words: [`${noteText(key.midi)} does not belong`, flagWords(key)],
    shortWords: [`${noteText(key.midi)} does not belong`],
  };
}

/** B of every key: the median curve with its band, measured notes filled, predicted ones hollow. */
export function inharmonicityPlot(analysis: AnalysisRecord): KeyPlot {
  const { keys } = analysis;
  const belonging = keys.filter((key) => key.flag === null);
  const flagged = flaggedKeys(analysis);
  return {
    id: "inharmonicity",
    title: "B",
    axis: { kind: "log" },
    layers: [
      {
        kind: "curve",
        name: "95 % band",
        faint: true,
        points: belonging.map((key) => ({ ...point(key), low: key.bLow, high: key.bHigh })),
      },
      {
        kind: "marks",
        mark: "predicted",
        name: "predicted",
        points: belonging.filter((key) => key.source === "predicted").map(point),
      },
      {
        kind: "marks",
        mark: "measured",
        name: "measured",
        points: belonging.filter((key) => key.source === "measured").map(point),
      },
      ...(flagged.length > 0
        ? [{ kind: "flagged" as const, name: "does not belong", points: flagged.map(flaggedPoint) }]
        : []),
    ],
    table: {
      columns: [
        { key: "b", label: "B × 10−4", spoken: "B times ten to the minus four" },
        { key: "low", label: "low, 95 %" },
        { key: "high", label: "high, 95 %" },
        { key: "source", label: "" },
      ],
      rows: keys.map((key) => ({
        midi: key.midi,
        cells: [
          { text: inharmonicity(key.b), copy: String(key.b * 1e4) },
          { text: inharmonicity(key.bLow), copy: String(key.bLow * 1e4) },
          { text: inharmonicity(key.bHigh), copy: String(key.bHigh * 1e4) },
          { text: key.flag === null ? key.source : "does not belong" },
        ],
      })),
    },
  };
}

/** The plan with its band, the anchor, and the pitch as it was found. */
export function stretchPlot(analysis: AnalysisRecord, foundName = "as found"): KeyPlot {
  const { notes, pitch, referenceHz } = analysis;
  const first = notes[0];
  const last = notes.at(-1);
  const anchor = notes.find((note) => note.midi === 69);
  const extremes = [first, last].flatMap((note) =>
    note
      ? [
          {
            midi: note.midi,
            value: note.stretchCents,
            lines: [
              `${noteText(note.midi)} ${signedCents(note.stretchCents)}${note.bandCents === null ? "" : ` ± ${fixed(note.bandCents, 1)}`}`,
            ],
          },
        ]
      : [],
  );
  return {
    id: "stretch",
    title: "Stretch, cents",
    axis: { kind: "symmetric", atLeast: 20 },
    layers: [
      {
        kind: "curve",
        name: "plan, 95 % band",
        points: notes.map(({ midi, stretchCents, bandCents }) => ({
          midi,
          value: stretchCents,
          low: bandCents === null ? null : stretchCents - bandCents,
          high: bandCents === null ? null : stretchCents + bandCents,
        })),
      },
      ...(pitch.length > 0
        ? [
            {
              kind: "marks" as const,
              mark: "as-found" as const,
              name: foundName,
              points: pitch.map(({ midi, cents }) => ({ midi, value: cents })),
            },
          ]
        : []),
      ...(anchor
        ? [
            {
              kind: "marks" as const,
              mark: "anchor" as const,
              points: [{ midi: anchor.midi, value: anchor.stretchCents }],
            },
          ]
        : []),
    ],
    labels: [
      ...extremes,
      ...(anchor
        ? [
            {
              midi: anchor.midi,
              value: anchor.stretchCents,
              lines: [`A4, anchor, ${plainHz(referenceHz)} Hz`],
              deskOnly: true,
            },
          ]
        : []),
    ],
    table: planTable(analysis),
  };
}

function plainHz(hz: number): string {
  return hz % 1 === 0 ? hz.toFixed(0) : hz.toFixed(1);
}

export function planTable({ notes }: Pick<AnalysisRecord, "notes">): KeyPlot["table"] {
  return {
    columns: [
      { key: "stretch", label: "stretch, cents" },
      { key: "band", label: "± 95 %", spoken: "plus or minus, 95 per cent, cents" },
      { key: "target", label: "f1, Hz" },
      { key: "partial", label: "listen to partial" },
      { key: "listen", label: "at, Hz" },
    ],
    rows: notes.map((note) => ({
      midi: note.midi,
      cells: [
        { text: signed(note.stretchCents, 2), copy: note.stretchCents.toFixed(3) },
        {
          text: note.bandCents === null ? "–" : fixed(note.bandCents, 2),
          copy: note.bandCents === null ? "" : note.bandCents.toFixed(3),
        },
        { text: fixed(note.targetHz, 2), copy: note.targetHz.toFixed(4) },
        { text: String(note.listenPartial) },
        { text: fixed(note.listenHz, 2), copy: note.listenHz.toFixed(4) },
      ],
    })),
  };
}

/** Half-width of B's band at a key, for "2.12 ± 0.18". */
export function halfBand(key: Pick<Key, "bLow" | "bHigh">): number {
  return (key.bHigh - key.bLow) / 2;
}
