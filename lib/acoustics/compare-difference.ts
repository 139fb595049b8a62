import { studentQuantile } from "./distributions";
import { REJECTION_LEVEL } from "./fit-selection";
import { inharmonicCents, inharmonicCentsSlope } from "./partials";

/** One partial read on both visits: cents it moved. */
export type Move = { partial: number; cents: number; weight: number };

export type Difference = {
  /** Cents that f1 rose. */
  f1Cents: number;
  /** Change of ln B. */
  lnB: number;
  /** Variance of the change of ln B per unit of residual variance. */
  lnBFactor: number;
  /** Residual variance in cents², for readings of mean weight. */
  variance: number;
  dof: number;
  partials: number[];
};

/** What is assumed of the error of a move while looking for misread partials: cents, and its weight in degrees of freedom. */
const ASSUMED_MOVE_SIGMA = 0.4;
const ASSUMED_DOF = 4;
const MOST_ITERATIONS = 30;
const LARGEST_CHANGE = 6;

/**
 * Least squares of the moves d_n = Δf1 + I_n(B·e^{Δ/2}) − I_n(B·e^{−Δ/2}) over (Δf1, Δ): each partial's own departure from
 * the law is there on both visits and falls out. One misread partial in three may be left out.
 */
export function fitDifference(moves: readonly Move[], b: number): Difference {
  let used = moves;
  const most = Math.floor((moves.length - 3) / 3);
  for (let left = 0; ; left += 1) {
    const { difference, worst } = solveDifference(used, b);
    if (worst < 0 || left >= most) return difference;
    used = used.filter((_, index) => index !== worst);
  }
}

/** Gauss-Newton with both columns centred, as in `fit-core`; `worst` is the move too far from the others, or −1. */
function solveDifference(moves: readonly Move[], b: number): { difference: Difference; worst: number } {
  const total = moves.length;
  const meanWeight = moves.reduce((sum, { weight }) => sum + weight, 0) / total;
  const weights = moves.map(({ weight }) => weight / meanWeight);
  const residuals = new Float64Array(total);
  const slopes = new Float64Array(total);
  let lnB = 0;
  let f1Cents = 0;
  let slopeMean = 0;
  let information = 0;
  let squares = 0;
  for (let round = 0; round < MOST_ITERATIONS; round += 1) {
    const later = b * Math.exp(lnB / 2);
    const earlier = b * Math.exp(-lnB / 2);
    f1Cents = 0;
    slopeMean = 0;
    for (let i = 0; i < total; i += 1) {
      const n = moves[i]?.partial ?? 1;
      const w = weights[i] ?? 0;
      const residual = (moves[i]?.cents ?? 0) - inharmonicCents(n, later) + inharmonicCents(n, earlier);
      const slope =
        0.5 * (later * inharmonicCentsSlope(n, later) + earlier * inharmonicCentsSlope(n, earlier));
      residuals[i] = residual;
      slopes[i] = slope;
      f1Cents += (w * residual) / total;
      slopeMean += (w * slope) / total;
    }
    information = 0;
    squares = 0;
    let gradient = 0;
    for (let i = 0; i < total; i += 1) {
      const w = weights[i] ?? 0;
      const r = (residuals[i] ?? 0) - f1Cents;
      const g = (slopes[i] ?? 0) - slopeMean;
      information += w * g * g;
      gradient += w * g * r;
      squares += w * r * r;
    }
    const step = Math.min(Math.max(gradient / information, -0.5), 0.5);
    if (Math.abs(step) < 1e-10) break;
    lnB = Math.min(Math.max(lnB + step, -LARGEST_CHANGE), LARGEST_CHANGE);
  }
  const dof = total - 2;
  const difference = {
    f1Cents,
    lnB,
    lnBFactor: 1 / information,
    variance: dof > 0 ? squares / dof : 0,
    dof,
    partials: moves.map(({ partial }) => partial),
  };
  let worst = -1;
  let worstRatio = 1;
  for (let i = 0; i < total && dof > 1; i += 1) {
    const w = weights[i] ?? 0;
    const r = (residuals[i] ?? 0) - f1Cents;
    const g = (slopes[i] ?? 0) - slopeMean;
    const left = 1 - w * (1 / total + (g * g) / information);
    if (!(left > 1e-9)) continue;
    const explained = (w * r * r) / left;
    const othersDof = ASSUMED_DOF + dof - 1;
    const scale = (ASSUMED_DOF * ASSUMED_MOVE_SIGMA ** 2 + Math.max(0, squares - explained)) / othersDof;
    const ratio = Math.sqrt(explained / scale) / studentQuantile(REJECTION_LEVEL, othersDof);
    if (ratio > worstRatio) {
      worst = i;
      worstRatio = ratio;
    }
  }
  return { difference, worst };
}
