import { LAST_KEY_WITH_WEAK_FIRST_PARTIAL, TYPICAL_LN_B_SIGMA } from "./fit-prior";
import { rejectionOf } from "./fit-reasons";
import type { FitState } from "./fit-state";
import { centsBetween } from "./keys";
import { inharmonicCents, inharmonicCentsSlope, partialHzFromF1 } from "./partials";
import { AcousticsError, type FitResult, type Reading, type Rejection } from "./types";

/**
 * One believable reading: f1 only, with B unknown. A higher partial is brought down with the typical B of the key,
 * whose uncertainty goes into σ of f1.
 */
export function fitOneReading(readings: readonly Reading[], state: FitState): FitResult {
  const { frequencies, midi } = state;
  const chosen = readings.reduce<number>((lowest, { partial }, i) => {
    if (state.open[i] !== 1) return lowest;
    return lowest < 0 || partial < (readings[lowest]?.partial ?? 0) ? i : lowest;
  }, -1);
  const reading = readings[chosen];
  const hz = frequencies[chosen];
  if (!reading || hz === undefined) {
    throw new AcousticsError("all-dropped", "Every reading of this note is dropped.", "readings");
  }
  const { partial } = reading;
  const b = state.typicalB;
  const f1Hz = hz / partialHzFromF1(partial, 1, b);
  const sigma = 1 / Math.sqrt(state.sheet.weights[chosen] ?? 1);
  const residuals = readings.map((each, i) => ({
    partial: each.partial,
    cents: centsBetween(f1Hz * each.partial, frequencies[i] ?? hz) - inharmonicCents(each.partial, b),
  }));
  const rejected = residuals.flatMap(({ partial: n, cents }, i): Rejection[] =>
    i === chosen ? [] : [rejectionOf(n, cents, state, i, { f1Hz, b })],
  );
  return {
    f1Hz,
    f1SigmaCents: Math.hypot(sigma, inharmonicCentsSlope(partial, b) * b * TYPICAL_LN_B_SIGMA),
    b: null,
    bSigma: null,
    bLow: null,
    bHigh: null,
    correlation: null,
    rmsCents: 0,
    chi2: 0,
    dof: 0,
    nMax: partial,
    used: [partial],
    rejected,
    residuals,
    quality: "repeat",
    warnings:
      partial === 1 && midi <= LAST_KEY_WITH_WEAK_FIRST_PARTIAL
        ? ["single-reading", "first-partial-unreliable"]
        : ["single-reading"],
  };
}
