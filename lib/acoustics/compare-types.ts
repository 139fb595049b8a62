import type { Register } from "./registers";
import type { Reading } from "./types";

/** Readings of one note on one visit. */
export type NoteReadings = {
  midi: number;
  /** Which string of the unison was read, when it is recorded: 1 is the left one. */
  string?: number;
  readings: readonly Reading[];
  kept?: readonly number[];
  dropped?: readonly number[];
};

export type VisitReadings = {
  notes: readonly NoteReadings[];
  referenceHz?: number;
  humidityPercent?: number;
};

export type CompareInput = {
  /** The earlier visit, as left. */
  before: VisitReadings;
  /** The later visit, as found. */
  after: VisitReadings;
  /** Share of the notes called changed that may be so by chance. Default 0.05. */
  falseDiscoveryRate?: number;
};

export type Verdict = "unchanged" | "changed" | "not-comparable";
export type NotComparable =
  | "not-read-before"
  | "not-read-after"
  | "different-string"
  | "too-few-matched-partials"
  | "b-not-positive";

export type NoteComparison = {
  midi: number;
  verdict: Verdict;
  reason: NotComparable | null;
  /** Change of ln B after bringing both visits to the same f1; null when not comparable, as all that follow. */
  deltaLnB: number | null;
  deltaLnBSigma: number | null;
  low: number | null;
  high: number | null;
  dof: number | null;
  t: number | null;
  pValue: number | null;
  /** The p-value after false-discovery control over the notes. */
  adjustedPValue: number | null;
  /** Relative change of B that would be found four times in five, 0.12 for 12 %. */
  detectableChange: number | null;
  matchedPartials: number[];
  /** Cents that f1 moved; null when no partial is matched. */
  pitchCents: number | null;
};

export type RegisterPitch = {
  register: Register;
  notes: number;
  meanCents: number;
  /** Error of the mean from the spread of the notes; null for one note. */
  sigmaCents: number | null;
};

export type CompareResult = {
  falseDiscoveryRate: number;
  notes: NoteComparison[];
  pitch: RegisterPitch[];
  humidity: { beforePercent: number; afterPercent: number; changePercent: number } | null;
};
