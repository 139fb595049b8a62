import { publishedMeanB } from "./keyboard-prior";
import { HIGHEST_PIANO_KEY, LOWEST_PIANO_KEY } from "./keys";

/** What is assumed about one string before it is read. */

/** Error of measuring a partial, cents: typed readings and a good tuning instrument agree to about this (common practice, no source). */
export const MEASURING_SIGMA = 0.15;

/**
 * Scatter of a key's partials about the stiff-string law, cents, one standard deviation. Fitted by eye to the
 * residuals of thirty recorded notes (tests/reference/recorded-notes.json): 0.3 to 1.3 over most of the compass,
 * up to 2.5 in the top octaves; more in the low bass.
 */
export function irregularitySigma(midi: number): number {
  if (midi < 40) return 0.7 + (0.5 * (40 - midi)) / 19;
  if (midi <= 69) return 0.7;
  return 0.7 + (0.9 * Math.min(midi - 69, 20)) / 20;
}

/** Total standard deviation assumed for a reading that comes without one, cents. */
export function assumedSigma(midi: number): number {
  const irregularity = irregularitySigma(midi);
  return Math.sqrt(MEASURING_SIGMA * MEASURING_SIGMA + irregularity * irregularity);
}

/** Weight of the assumed scatter, in degrees of freedom, when one reading is judged against the others. */
export const REJECTION_PRIOR_DOF = 4;

/**
 * Degrees of freedom up to which the assumed scatter fills in for the intervals: a sheet that has so many of its own
 * speaks for itself.
 */
export const INTERVAL_PRIOR_DOF = 3;

/** Typical B of a key; keys beyond the piano take the nearest one's. */
export function typicalB(midi: number): number {
  return publishedMeanB(Math.min(Math.max(midi, LOWEST_PIANO_KEY), HIGHEST_PIANO_KEY));
}

/** How far ln B of one string lies from typical, one standard deviation: instruments differ most in the bass. */
export const TYPICAL_LN_B_SIGMA = 0.8;

/** First partials up to this key are weak and pulled by the soundboard: common practice, no source. */
export const LAST_KEY_WITH_WEAK_FIRST_PARTIAL = 40;
