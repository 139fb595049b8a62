import type { ReactNode } from "react";

/** What a plot over the keys is made of. All of it is plain data in the units of the plot's title. */

export type KeyValue = { midi: number; value: number };
export type CurvePoint = KeyValue & { low?: number | null; high?: number | null };

/** Marks that stand for one note; the shape says what the colour says. */
export type MarkKind = "measured" | "predicted" | "as-found" | "as-left" | "anchor" | "unsure";

export type PlotLayer =
  /** Median and, where the points carry it, the 95 % band. Faint under hollow dots. */
  | { kind: "curve"; name?: string; points: readonly CurvePoint[]; faint?: boolean }
  /** Band without a line; `soft` for a second band or expected scatter. */
  | {
      kind: "band";
      name?: string;
      points: readonly { midi: number; low: number; high: number }[];
      soft?: boolean;
    }
  | { kind: "marks"; mark: MarkKind; name?: string; points: readonly KeyValue[]; stems?: boolean }
  /** One of two visits compared: its curve and the notes measured then. */
  | {
      kind: "visit";
      age: "older" | "newer";
      name?: string;
      curve: readonly KeyValue[];
      measured: readonly KeyValue[];
    }
  /** Notes that do not belong: a triangle, words (the first line in rust), a leader. */
  | { kind: "flagged"; name?: string; points: readonly FlaggedPoint[]; stems?: boolean };

export type FlaggedPoint = KeyValue & {
  words: readonly string[];
  /** Fewer words for the phone; the same words when left out. */
  shortWords?: readonly string[];
};

/** Words at a point: extremes and anchors. The first line may be strong. */
export type PlotLabel = KeyValue & { lines: readonly string[]; strong?: boolean; deskOnly?: boolean };

export type PlotAxis =
  | { kind: "log"; low?: number; high?: number }
  /** Symmetric about zero; `atLeast` keeps a quiet plot from being blown up. */
  | { kind: "symmetric"; atLeast?: number };

export type TableCell = {
  text: string;
  /** What is copied in place of the text, for a spreadsheet. */
  copy?: string;
};

export type PlotTableData = {
  /** Plain words, units included: "B × 10⁻⁴" is said "B, times ten to the minus four" in `spoken`. */
  columns: readonly { key: string; label: ReactNode; spoken?: string }[];
  rows: readonly { midi: number; cells: readonly TableCell[] }[];
};

export type KeyPlot = {
  id: string;
  /** With its unit: "Stretch, cents". */
  title: string;
  axis: PlotAxis;
  layers: readonly PlotLayer[];
  labels?: readonly PlotLabel[];
  /** At the end of the title line. */
  aside?: ReactNode;
  /** Height of the plotting area; 276 on the desk and 176 on a phone unless said. */
  height?: number;
  phoneHeight?: number;
  table: PlotTableData;
};
