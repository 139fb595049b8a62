import {
  addToBand,
  at,
  type BandMatrix,
  bandMatrix,
  choleskyBandInPlace,
  NotPositiveDefinite,
  solveBand,
} from "./linear-algebra";
import { inharmonicCents } from "./partials";
import type { PlanSettings } from "./stretch-input";
import { AcousticsError, type IntervalRule } from "./types";

/** One coincidence: partial p of the key at `lower` against partial q of the key at `upper`, both positions in `keys`. */
export type Coincidence = {
  lower: number;
  upper: number;
  lowerPartial: number;
  upperPartial: number;
  weight: number;
  /** Width asked for beyond the temperament's, cents: 0 unless the target is the just width. */
  wanted: number;
};

export type StretchSystem = {
  settings: PlanSettings;
  b: Float64Array;
  coincidences: readonly Coincidence[];
  /** Cholesky factor of the normal matrix, with the anchor held. */
  factor: BandMatrix;
  /** Stretch minus temperament, cents per key. */
  departure: Float64Array;
};

/** Stands for the limit of vanishing smoothness, as a share of the largest weight: it moves a plan by less than 1e-4 cent. */
const vanishingSmoothness = 1e-8;

/**
 * Least squares over coincident partials: with u = s − t, minimise
 * Σ w·(u_j + I_q(B_j) − u_i − I_p(B_i) − wanted)² + λ·Σ (second difference of u)², the anchor held at
 * u_a + I_n(B_a) = 0. Method: least squares on partials after Koenig 2014 (from memory); the smoothing term is ours.
 * `b` is per key of `settings.keys`. Errors: AcousticsError `undetermined` when the style leaves keys free.
 */
export function solveStretch(settings: PlanSettings, b: Float64Array): StretchSystem {
  const n = settings.keys.length;
  const coincidences = listCoincidences(settings);
  const width = coincidences.reduce((widest, { lower, upper }) => Math.max(widest, upper - lower), 2);
  const factor = bandMatrix(n, Math.min(width, n - 1));
  addSmoothness(factor, settings, coincidences);
  const departure = new Float64Array(n);
  for (const { lower, upper, lowerPartial, upperPartial, weight, wanted } of coincidences) {
    addToBand(factor, lower, lower, weight);
    addToBand(factor, upper, upper, weight);
    addToBand(factor, upper, lower, -weight);
    const rise =
      weight *
      (wanted + inharmonicCents(lowerPartial, at(b, lower)) - inharmonicCents(upperPartial, at(b, upper)));
    departure[upper] = at(departure, upper) + rise;
    departure[lower] = at(departure, lower) - rise;
  }
  const { position, partial } = settings.anchor;
  hold(factor, position);
  departure[position] = 0;
  try {
    choleskyBandInPlace(factor);
  } catch (error) {
    if (!(error instanceof NotPositiveDefinite)) throw error;
    throw new AcousticsError(
      "undetermined",
      `The style leaves key ${settings.keys[error.row] ?? ""} without any interval that fixes it`,
      "style.intervals",
    );
  }
  solveBand(factor, departure);
  const shift = inharmonicCents(partial, at(b, position));
  for (let i = 0; i < n; i += 1) departure[i] = at(departure, i) - shift;
  return { settings, b, coincidences, factor, departure };
}

function listCoincidences({ keys, offsets, style }: PlanSettings): Coincidence[] {
  const positions = new Map(keys.map((midi, position) => [midi, position]));
  const lowest = keys[0] ?? 0;
  const found: Coincidence[] = [];
  for (const rule of style.intervals) {
    keys.forEach((midi, lower) => {
      const upper = positions.get(midi + rule.semitones);
      const weight = weightAt(rule, midi - lowest);
      if (upper === undefined || weight === 0) return;
      const tempered = 100 * rule.semitones + (offsets[upper] ?? 0) - (offsets[lower] ?? 0);
      const just = 1200 * Math.log2(rule.lowerPartial / rule.upperPartial);
      const { lowerPartial, upperPartial } = rule;
      const wanted = rule.target === "just" ? just - tempered : 0;
      found.push({ lower, upper, lowerPartial, upperPartial, weight, wanted });
    });
  }
  if (found.length === 0) {
    throw new AcousticsError(
      "undetermined",
      "No interval of the style lies on this keyboard",
      "style.intervals",
    );
  }
  return found;
}

function weightAt({ weights }: IntervalRule, index: number): number {
  return typeof weights === "number" ? weights : (weights[index] ?? 0);
}

/** Second differences over neighbouring keys; where keys are missing, divided differences over the gap. */
function addSmoothness(
  matrix: BandMatrix,
  { keys, style }: PlanSettings,
  coincidences: readonly Coincidence[],
): void {
  const largest = coincidences.reduce((weight, coincidence) => Math.max(weight, coincidence.weight), 0);
  const lambda = style.smoothness > 0 ? style.smoothness : vanishingSmoothness * largest;
  for (let i = 1; i + 1 < keys.length; i += 1) {
    const below = (keys[i] ?? 0) - (keys[i - 1] ?? 0);
    const above = (keys[i + 1] ?? 0) - (keys[i] ?? 0);
    const scale = 2 / (below + above);
    const stencil = [scale / below, -scale / below - scale / above, scale / above];
    stencil.forEach((left, p) => {
      stencil.forEach((right, q) => {
        if (q <= p) addToBand(matrix, i - 1 + p, i - 1 + q, lambda * left * right);
      });
    });
  }
}

/** Replaces row and column of the anchor by those of the unit matrix. */
function hold(matrix: BandMatrix, position: number): void {
  const stride = matrix.width + 1;
  for (let d = 0; d <= matrix.width; d += 1) {
    if (position - d >= 0) matrix.values[position * stride + d] = 0;
    if (position + d < matrix.n) matrix.values[(position + d) * stride + d] = 0;
  }
  matrix.values[position * stride] = 1;
}
