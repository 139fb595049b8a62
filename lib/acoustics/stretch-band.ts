import { irregularitySigma } from "./fit-prior";
import { interpolate, type Knot } from "./keyboard-prior";
import {
  addSparseOuter,
  addSquares,
  at,
  choleskySemidefiniteInPlace,
  columnDots,
  lowerColumn,
  product,
  solveBand,
} from "./linear-algebra";
import { inharmonicCentsSlope } from "./partials";
import type { StretchSystem } from "./stretch-system";

export const z95 = 1.959964;

/** Low bass partials are pulled by the soundboard: their scatter in cents at A0, fading to none at E2. */
const pulledPartials: Readonly<Record<number, number>> = { 1: 5, 2: 2, 3: 2, 4: 2 };
const lastPulledMidi = 40;

/**
 * What a fit leaves of a note's irregularity, as a share of its σ: a fit has few partials in the treble, and its two
 * parameters take up much of their scatter. About sqrt(1 − 2/N); the usable N is common practice, no source.
 */
const leftByFit: readonly Knot[] = [
  [72, 1],
  [93, 0.85],
  [108, 0.65],
];

/**
 * Scatter of a partial about the curve used for its note, cents, one standard deviation: typical for the register, or
 * `residualCents`, the root mean square residual of the note's own fit.
 */
export function partialIrregularitySigma(midi: number, partial: number, residualCents?: number): number {
  const pulled = Math.min(1, Math.max(0, (lastPulledMidi - midi) / 19)) * (pulledPartials[partial] ?? 0);
  return Math.hypot(residualCents ?? irregularitySigma(midi) * interpolate(leftByFit, midi), pulled);
}

/**
 * J = ∂s/∂ln B, cents, keys × keys with one **column** of J stored after another (column k at k·n): the effect of key k's
 * ln B on every key's stretch.
 */
export function stretchByLnB(system: StretchSystem): Float64Array {
  const { settings, b, coincidences, factor } = system;
  const n = settings.keys.length;
  const { position, partial } = settings.anchor;
  const columns = new Float64Array(n * n);
  for (const { lower, upper, lowerPartial, upperPartial, weight } of coincidences) {
    const byLower = weight * at(b, lower) * inharmonicCentsSlope(lowerPartial, at(b, lower));
    const byUpper = weight * at(b, upper) * inharmonicCentsSlope(upperPartial, at(b, upper));
    if (upper !== position) {
      columns[lower * n + upper] = at(columns, lower * n + upper) + byLower;
      columns[upper * n + upper] = at(columns, upper * n + upper) - byUpper;
    }
    if (lower !== position) {
      columns[lower * n + lower] = at(columns, lower * n + lower) - byLower;
      columns[upper * n + lower] = at(columns, upper * n + lower) + byUpper;
    }
  }
  for (let k = 0; k < n; k += 1) solveBand(factor, columns, k * n, Math.max(0, k - factor.width));
  const anchorSlope = at(b, position) * inharmonicCentsSlope(partial, at(b, position));
  for (let i = 0; i < n; i += 1) columns[position * n + i] = at(columns, position * n + i) - anchorSlope;
  return columns;
}

/** cov(ln B)·Jᵀ: row k holds the covariance of ln B_k with every key's stretch. */
export function covarianceWithStretch(
  columns: Float64Array,
  covariance: Float64Array,
  n: number,
): Float64Array {
  return product(covariance, columns, n);
}

/** Diagonal of J·cov(ln B)·Jᵀ, cents², from J's columns and `covarianceWithStretch`. */
export function stretchVariance(columns: Float64Array, withStretch: Float64Array, n: number): Float64Array {
  return columnDots(columns, withStretch, n);
}

/**
 * Diagonal of P·R·Pᵀ, cents²: the plan's share of the partials' irregularity. Irregularities of different partials are independent, so their
 * covariance on the right-hand side of the normal equations is a sparse sum of outer products; its factor is solved
 * through the normal matrix. `residuals[i]` is the own residual of the key at position i, where it has one.
 */
export function irregularityVariance(
  system: StretchSystem,
  residuals: readonly (number | undefined)[],
): Float64Array {
  const { settings, factor } = system;
  const n = settings.keys.length;
  const { position, partial } = settings.anchor;
  const variance = new Float64Array(n);
  const sides = new Float64Array(n * n);
  // The anchor's own partial also shifts the whole plan, unless it is the first, by which stretch is defined.
  const held = { key: position, number: partial, effects: new Map<number, number>() };
  for (const { key, number, effects } of effectsByPartial(system)) {
    if (key === held.key && number === held.number && partial > 1) {
      held.effects = effects;
      continue;
    }
    const sigma = partialIrregularitySigma(settings.keys[key] ?? 0, number, residuals[key]);
    addSparseOuter(sides, n, effects, sigma * sigma);
  }
  choleskySemidefiniteInPlace(sides, n);
  for (let k = 0; k < n; k += 1) {
    if (at(sides, k * n + k) === 0) continue;
    const column = lowerColumn(sides, n, k);
    solveBand(factor, column, 0, k);
    addSquares(variance, column);
  }
  if (partial > 1) {
    const sigma = partialIrregularitySigma(settings.keys[position] ?? 0, partial, residuals[position]);
    const column = new Float64Array(n);
    for (const [row, effect] of held.effects) column[row] = effect;
    solveBand(factor, column);
    addSquares(
      variance,
      column.map((value) => sigma * (value - 1)),
    );
  }
  return variance;
}

type PartialEffects = { key: number; number: number; effects: Map<number, number> };

/** For each partial of each key that any coincidence uses: what one cent of it adds to the normal equations' right-hand side. */
function effectsByPartial({ settings, coincidences }: StretchSystem): PartialEffects[] {
  const byPartial = new Map<number, PartialEffects>();
  const anchor = settings.anchor.position;
  const note = (key: number, number: number, row: number, effect: number) => {
    if (row === anchor) return;
    const id = key * 64 + number;
    let entry = byPartial.get(id);
    if (entry === undefined) {
      entry = { key, number, effects: new Map() };
      byPartial.set(id, entry);
    }
    entry.effects.set(row, (entry.effects.get(row) ?? 0) + effect);
  };
  for (const { lower, upper, lowerPartial, upperPartial, weight } of coincidences) {
    note(lower, lowerPartial, upper, weight);
    note(lower, lowerPartial, lower, -weight);
    note(upper, upperPartial, upper, -weight);
    note(upper, upperPartial, lower, weight);
  }
  return [...byPartial.values()];
}
