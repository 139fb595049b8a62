import { TYPICAL_LN_B_SIGMA, typicalB } from "./fit-prior";
import { centsBetween, equalTemperedHz, STANDARD_PITCH_HZ } from "./keys";
import { inharmonicCents, partialHzFromF1 } from "./partials";
import type { FitResult } from "./types";

/** Further than this from where the partial is expected, a typed frequency is asked about. */
export const ASK_BEYOND_CENTS = 200;

export type Expectation = {
  midi: number;
  referenceHz?: number;
  /** How far the instrument stands from the reference pitch, cents; 0 when nothing is known. */
  pitchOffsetCents?: number;
  /** B of this key from the keyboard model, and σ of its logarithm. Default: what is typical of the key. */
  model?: { b: number; lnBSigma: number };
  /** The fit of the readings typed so far on this row. */
  running?: Pick<FitResult, "f1Hz" | "b" | "bSigma">;
};

export type Expected = {
  hz: number;
  /** Cents from n times the note's equal-tempered frequency, the column a sheet in cents is typed in. */
  cents: number;
};

/**
 * Where a partial of this note is expected: from the row's running fit, else from the key at the instrument's pitch,
 * with B from the keyboard model and the running fit weighed by their errors. Honest high partials lie hundreds of cents
 * above the harmonic; this is what they must be compared with.
 */
export function expectedPartial(expectation: Expectation, partial: number): Expected {
  const { midi, referenceHz = STANDARD_PITCH_HZ, pitchOffsetCents = 0, running } = expectation;
  const keyHz = equalTemperedHz(midi, referenceHz);
  const f1Hz = running?.f1Hz ?? keyHz * 2 ** (pitchOffsetCents / 1200);
  const hz = partialHzFromF1(partial, f1Hz, expectedB(expectation));
  return { hz, cents: centsBetween(partial * keyHz, hz) };
}

function expectedB({ midi, model, running }: Expectation): number {
  const b = model?.b ?? typicalB(midi);
  const sigma = model?.lnBSigma ?? TYPICAL_LN_B_SIGMA;
  if (!running || running.b === null || running.bSigma === null || running.b <= 0) return b;
  const modelWeight = 1 / (sigma * sigma);
  const runningWeight = (running.b / running.bSigma) ** 2;
  if (!Number.isFinite(runningWeight)) return running.b;
  const mean = modelWeight * Math.log(b) + runningWeight * Math.log(running.b);
  return Math.exp(mean / (modelWeight + runningWeight));
}

export type FrequencyCheck = {
  expectedHz: number;
  /** Cents of the typed frequency above the expected one; null when it is no frequency. */
  awayCents: number | null;
  /** The page asks; it never drops the reading by itself. */
  ask: boolean;
  /** The partial of this note whose expected place is within 50 cents, when it is another one. */
  fitsPartial: number | null;
};

/** Whether a typed frequency is so far from the expected place of its partial that a person should be asked. */
export function checkFrequency(expectation: Expectation, partial: number, hz: number): FrequencyCheck {
  const expected = expectedPartial(expectation, partial);
  if (!(Number.isFinite(hz) && hz > 0)) {
    return { expectedHz: expected.hz, awayCents: null, ask: true, fitsPartial: null };
  }
  const awayCents = centsBetween(expected.hz, hz);
  const ask = Math.abs(awayCents) > ASK_BEYOND_CENTS;
  return {
    expectedHz: expected.hz,
    awayCents,
    ask,
    fitsPartial: ask ? otherPartial(expectation, partial, hz) : null,
  };
}

function otherPartial(expectation: Expectation, partial: number, hz: number): number | null {
  const f1Hz = expectedPartial(expectation, 1).hz;
  const b = expectedB(expectation);
  for (let n = 1; n <= 32; n += 1) {
    const away = centsBetween(n * f1Hz, hz) - inharmonicCents(n, b);
    if (n !== partial && Math.abs(away) <= 50) return n;
  }
  return null;
}
