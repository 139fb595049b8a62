import { irregularitySigma } from "./fit-prior";
import { interpolate, type Knot } from "./keyboard-prior";
import { at, choleskySemidefiniteInPlace, product, solveBand } from "./linear-algebra";
import { inharmonicCentsSlope } from "./partials";
import type { StretchSystem } from "./stretch-system";

const unmeasured: Knowledge = { measured: false };
export const z95 = 1.959964;

/** Low bass partials are pulled by the soundboard: their scatter in cents at A0, fading to none at E2. */
const pulledPartials: Readonly<Record<number, number>> = { 1: 5, 2: 2, 3: 2, 4: 2 };
const lastPulledMidi = 40;

/**
 * What a fit leaves of a note's irregularity, as a share of its σ: two parameters through the three or four partials of a top
 * note take up much of it. 1 − 2/N for N usable partials, under the root; N is common practice, no source.
 */
const leftByFit: readonly Knot[] = [
  [72, 1],
  [93, 0.8],
  [108, 0.65],
];

/** How a key's B is known: `residualCents` is the root mean square residual of its own fit, if it has one. */
export type Knowledge = { measured: boolean; residualCents?: number };

/**
 * Scatter of a partial about the curve used for its note, cents, one standard deviation: typical for the register, or the
 * note's own residual.
 */
export function partialIrregularitySigma(midi: number, partial: number, knowledge: Knowledge): number {
  const share = Math.min(1, Math.max(0, (lastPulledMidi - midi) / 19));
  const typical = irregularitySigma(midi) * (knowledge.measured ? interpolate(leftByFit, midi) : 1);
  return Math.hypot(knowledge.residualCents ?? typical, share * (pulledPartials[partial] ?? 0));
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
  for (let k = 0; k < n; k += 1) solveBand(factor, columns, k * n);
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
  const variance = new Float64Array(n);
  for (let k = 0; k < n; k += 1) {
    for (let i = 0; i < n; i += 1) {
      variance[i] = at(variance, i) + at(columns, k * n + i) * at(withStretch, k * n + i);
    }
  }
  return variance;
}

/**
 * Diagonal of P·R·Pᵀ, cents²: the plan's share of the partials' irregularity. Irregularities of different partials are independent, so their
 * covariance on the right-hand side of the normal equations is a sparse sum of outer products; its factor is solved
 * through the normal matrix. `known[i]` tells how the key at position i is known.
 */
export function irregularityVariance(system: StretchSystem, known: readonly Knowledge[]): Float64Array {
  const { settings, factor } = system;
  const n = settings.keys.length;
  const { position, partial } = settings.anchor;
  const variance = new Float64Array(n);
  const sides = new Float64Array(n * n);
  for (const { key, number, effects } of effectsByPartial(system)) {
    const sigma = partialIrregularitySigma(settings.keys[key] ?? 0, number, known[key] ?? unmeasured);
    if (key === position && number === partial && partial > 1) continue;
    for (const [row, left] of effects) {
      for (const [column, right] of effects) {
        if (column <= row)
          sides[row * n + column] = at(sides, row * n + column) + sigma * sigma * left * right;
      }
    }
  }
  choleskySemidefiniteInPlace(sides, n);
  const column = new Float64Array(n);
  const add = (scale: number) => {
    for (let i = 0; i < n; i += 1) variance[i] = at(variance, i) + (scale * at(column, i)) ** 2;
  };
  for (let k = 0; k < n; k += 1) {
    if (at(sides, k * n + k) === 0) continue;
    for (let i = 0; i < n; i += 1) column[i] = i < k ? 0 : at(sides, i * n + k);
    solveBand(factor, column);
    add(1);
  }
  if (partial > 1) {
    column.fill(0);
    const own = effectsByPartial(system).find(({ key, number }) => key === position && number === partial);
    for (const [row, effect] of own?.effects ?? []) column[row] = effect;
    solveBand(factor, column);
    for (let i = 0; i < n; i += 1) column[i] = at(column, i) - 1;
    add(partialIrregularitySigma(settings.keys[position] ?? 0, partial, known[position] ?? unmeasured));
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
