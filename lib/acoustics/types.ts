/**
 * Shapes shared by the whole of lib/acoustics. Property names are those of the command-line door.
 * Names ending in Sigma are one standard deviation; Low/High are ends and Band is a half-width at 95 %.
 */

/** One partial's reading. Give `hz`, or `cents` from n times the note's equal-tempered frequency. */
export type Reading = {
  partial: number;
  hz?: number;
  cents?: number;
  /** Total standard deviation of this reading in cents; believed when given. */
  sigmaCents?: number;
};

export type FitInput = {
  midi?: number;
  readings: readonly Reading[];
  /** Frequency of A4 that `cents` refers to. Default 440. */
  referenceHz?: number;
  /** Partials a person wants kept or dropped whatever the computation says. */
  kept?: readonly number[];
  dropped?: readonly number[];
  /** Highest partial used unless kept by hand. Default 16: in the bass B depends on the range. */
  maxPartial?: number;
};

export type RejectionReason =
  | "off-curve"
  | "wrong-partial-number"
  | "neighbouring-note"
  | "duplicate"
  | "beyond-range"
  | "dropped-by-hand";

export type Rejection = {
  partial: number;
  reason: RejectionReason;
  /** Distance from the fitted curve, cents. */
  residualCents: number;
  /** For `wrong-partial-number`: the partial whose place on the curve it fits. */
  fitsPartial?: number;
  /** For `neighbouring-note`: the note it probably belongs to. */
  fitsMidi?: number;
};

export type FitWarning =
  | "exact-no-check"
  | "single-reading"
  | "b-not-significant"
  | "few-partials"
  | "first-partial-unreliable"
  | "kept-off-curve"
  | "ambiguous-outlier"
  | "scatter-exceeds-sigma";

export type Quality = "good" | "usable" | "repeat";

export type FitResult = {
  f1Hz: number;
  f1SigmaCents: number;
  /** Null when fewer than two readings were accepted. */
  b: number | null;
  bSigma: number | null;
  bLow: number | null;
  bHigh: number | null;
  correlation: number | null;
  rmsCents: number;
  chi2: number;
  dof: number;
  nMax: number;
  used: number[];
  rejected: Rejection[];
  residuals: { partial: number; cents: number }[];
  quality: Quality;
  warnings: FitWarning[];
};

export type Observation = {
  midi: number;
  b: number;
  bSigma: number;
  /** Root mean square residual of the note's own fit, cents; the plan's band uses it in place of the register's. */
  residualCents?: number;
};

export type KeyboardInput = {
  observations: readonly Observation[];
  breakMidi?: number;
  firstMidi?: number;
  lastMidi?: number;
};

export type KeyEstimate = {
  midi: number;
  b: number;
  bLow: number;
  bHigh: number;
  lnBSigma: number;
  source: "measured" | "predicted";
  flag: null | "does-not-belong";
  z: number | null;
  /** On a measured key: B as all other notes predict it. */
  expectedB: number | null;
  /** Smallest relative change of B this sheet could have detected on a measured key, e.g. 0.12. */
  detectableChange: number | null;
  /** As given with the observation. */
  residualCents?: number;
};

export type KeyboardResult = {
  breakMidi: number;
  breakSource: "given" | "inferred" | "assumed";
  /** True when no observation informed the curve. */
  priorOnly: boolean;
  keys: KeyEstimate[];
  /** Covariance of ln B over `keys`, row by row. */
  covariance: number[][];
};

export type IntervalRule = {
  lowerPartial: number;
  upperPartial: number;
  semitones: number;
  /** One weight, or one per lower key from the lowest key of the instrument upwards. */
  weights: number | readonly number[];
  target?: "tempered" | "just";
};

export type Style = { intervals: readonly IntervalRule[]; smoothness: number; toleranceCents?: number };
export type BuiltInStyle = "close" | "even" | "wide" | "published";

export type TemperamentName =
  | "equal"
  | "pythagorean"
  | "meantone-quarter"
  | "werckmeister-3"
  | "kirnberger-3"
  | "vallotti"
  | "young-2"
  | "kellner";

/** A named temperament, or twelve offsets in cents from equal temperament for C, C#, … B. */
export type Temperament = TemperamentName | readonly number[];

export type StretchInput = {
  observations?: readonly Observation[];
  /** Exact B per key in place of observations: then there is no band. */
  keys?: readonly { midi: number; b: number }[];
  breakMidi?: number;
  firstMidi?: number;
  lastMidi?: number;
  style?: BuiltInStyle | Style;
  temperament?: Temperament;
  referenceHz?: number;
  anchor?: { midi: number; partial: number };
};

export type PlanNote = {
  midi: number;
  stretchCents: number;
  /** Null when B was given without error. */
  bandCents: number | null;
  targetHz: number;
  listenPartial: number;
  listenHz: number;
};

export type Evenness = {
  /** Coincident-partial beat rates of rising intervals over the temperament octaves, beats per second. */
  intervals: {
    name: "major-third" | "major-sixth" | "major-tenth";
    rates: { lowerMidi: number; beatsPerSecond: number }[];
    /** Root mean square departure of the rates from a smooth rise, as a share of the rate. */
    roughness: number;
    /** Lower keys at which the rate falls instead of rising. */
    reversals: number[];
  }[];
};

export type StretchResult = { notes: PlanNote[]; evenness: Evenness };

export type AdviseInput = Omit<StretchInput, "keys">;

export type AdviseResult = {
  /** Mean half-width of the plan's 95 % band now. */
  meanBandCents: number;
  /** Unmeasured keys, best first, with the mean half-width after reading each. */
  next: { midi: number; meanBandCents: number }[];
  enough: boolean;
  widest: {
    register: "bass" | "tenor" | "middle" | "treble" | "top";
    meanBandCents: number;
    toleranceCents: number;
  };
};

/** A rejected input: `path` names the field, as in "readings[3].hz". */
export class AcousticsError extends Error {
  constructor(
    readonly code: string,
    message: string,
    readonly path: string,
  ) {
    super(message);
    this.name = "AcousticsError";
  }
}
