import { keyboard } from "./keyboard";
import { interpolate, type Knot } from "./keyboard-prior";
import { at } from "./linear-algebra";
import { REGISTERS, type Register, registerOf } from "./registers";
import { flatCovariance, residualsOf, systemFrom } from "./stretch";
import {
  covarianceWithStretch,
  irregularityVariance,
  stretchByLnB,
  stretchVariance,
  z95,
} from "./stretch-band";
import type { PlanOptions } from "./stretch-input";
import { defaultToleranceCents } from "./styles";
import type { AdviseInput, AdviseResult, KeyboardResult } from "./types";

/** Relative σ of B from one careful sheet: common practice, no source. Few partials are usable at either end. */
const typicalErrors: readonly Knot[] = [
  [21, 0.04],
  [40, 0.03],
  [52, 0.02],
  [69, 0.012],
  [84, 0.02],
  [96, 0.05],
  [108, 0.07],
];

/** σ of ln B that a reading of this key would bring. */
export const typicalLnBSigma = (midi: number): number => interpolate(typicalErrors, midi);

/** Two more readings that together narrow the mean half-width by less than this are not worth their time, cents. */
const worthwhileGain = 0.2;

/**
 * What to measure next. For each unmeasured key the mean half-width of the plan's band after one reading of typical error that
 * falls where predicted; exact for the Gaussian model as long as the break stays where it is. Input as for `stretch`, without
 * `keys`; errors as for `stretch`. `enough` when every register's mean half-width is within the style's tolerance or two more readings
 * together gain less than 0.2 cent of the mean. `widest` is the register with the largest mean half-width.
 * Source: conditioning of a Gaussian, Rasmussen & Williams 2006, eq. A.6.
 */
export function advise(input: AdviseInput): AdviseResult {
  return adviceFrom(keyboard({ ...input, observations: input.observations ?? [] }), input);
}

/** Advice from a keyboard already computed: options as in `stretch`. */
export function adviceFrom(result: KeyboardResult, options: PlanOptions = {}): AdviseResult {
  const system = systemFrom(result, options);
  const n = result.keys.length;
  const covariance = flatCovariance(result);
  const columns = stretchByLnB(system);
  const withStretch = covarianceWithStretch(columns, covariance, n);
  const learned = stretchVariance(columns, withStretch, n);
  const fixed = irregularityVariance(system, residualsOf(result));
  const now = halfWidths(learned, fixed);
  const meanBandCents = mean(now);

  const open = result.keys.flatMap(({ source }, key) => (source === "predicted" ? [key] : []));
  const after = (key: number, cross: Float64Array, variance: number, base: Float64Array): Float64Array => {
    const scale = 1 / (variance + typicalLnBSigma(result.keys[key]?.midi ?? 0) ** 2);
    return base.map((value, i) => value - scale * at(cross, key * n + i) ** 2);
  };
  const next = open
    .map((key) => ({
      key,
      midi: result.keys[key]?.midi ?? 0,
      meanBandCents: mean(halfWidths(after(key, withStretch, at(covariance, key * n + key), learned), fixed)),
    }))
    .sort((a, b) => a.meanBandCents - b.meanBandCents);

  const tolerance = system.settings.style.toleranceCents ?? defaultToleranceCents;
  const byRegister = registerMeans(result, now);
  const widest = byRegister.reduce((a, b) => (b.meanBandCents > a.meanBandCents ? b : a));
  const settled = widest.meanBandCents <= tolerance;
  return {
    meanBandCents,
    next: next.map(({ midi, meanBandCents: value }) => ({ midi, meanBandCents: value })),
    enough: settled || meanBandCents - bestPair() < worthwhileGain,
    widest: { ...widest, toleranceCents: tolerance },
  };

  /** Mean half-width after the best reading and the best one after that. */
  function bestPair(): number {
    const first = next[0];
    if (first === undefined) return meanBandCents;
    const { key } = first;
    const scale = 1 / (at(covariance, key * n + key) + typicalLnBSigma(first.midi) ** 2);
    const learnedOnce = after(key, withStretch, at(covariance, key * n + key), learned);
    let best = first.meanBandCents;
    for (const second of open) {
      if (second === key) continue;
      const shared = at(covariance, second * n + key);
      const variance = at(covariance, second * n + second) - scale * shared * shared;
      const gain = 1 / (variance + typicalLnBSigma(result.keys[second]?.midi ?? 0) ** 2);
      const learnedTwice = learnedOnce.map((value, i) => {
        const cross = at(withStretch, second * n + i) - scale * shared * at(withStretch, key * n + i);
        return value - gain * cross * cross;
      });
      best = Math.min(best, mean(halfWidths(learnedTwice, fixed)));
    }
    return best;
  }
}

function halfWidths(learned: Float64Array, fixed: Float64Array): Float64Array {
  return learned.map((value, i) => z95 * Math.sqrt(Math.max(0, value) + at(fixed, i)));
}

function mean(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

function registerMeans(
  result: KeyboardResult,
  bands: Float64Array,
): { register: Register; meanBandCents: number }[] {
  return REGISTERS.flatMap((register) => {
    const own = bands.filter((_, i) => registerOf(result.keys[i]?.midi ?? 0) === register);
    return own.length === 0 ? [] : [{ register, meanBandCents: mean(own) }];
  });
}
