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
  /** Variances of the two per unit of residual variance. */
  f1Factor: number;
  lnBFactor: number;
  /** Residual variance in cents², for readings of mean weight. */
  variance: number;
  dof: number;
  partials: number[];
};

/** What is assumed of the error of a move while looking for misread partials: cents, and its weight in degrees of freedom. */
const ASSUMED_MOVE_SIGMA = 0.4;
const ASSUMED_DOF = 4;

/**
 * Least squares of the moves d_n = Δf1 + I_n(B·e^{Δ/2}) − I_n(B·e^{−Δ/2}) over (Δf1, Δ): each partial's own departure from
 * the law is there on both visits and falls out. One misread partial in three may be left out.
 */
export function fitDifference(moves: readonly Move[], b: number): Difference {
  let used = moves;
  const most = Math.floor((moves.length - 3) / 3);
  for (let left = 0; ; left += 1) {
    const difference = solveDifference(used, b);
    const worst = left < most ? worstMove(used, difference, b) : null;
    if (worst === null) return difference;
    used = used.filter((move) => move !== worst);
  }
}

function solveDifference(moves: readonly Move[], b: number): Difference {
  const meanWeight = moves.reduce((sum, { weight }) => sum + weight, 0) / moves.length;
  const total = moves.length;
  let lnB = 0;
  let f1Cents = 0;
  let slopeMean = 0;
  let information = 0;
  let squares = 0;
  for (let round = 0; round < 30; round += 1) {
    const rows = moves.map(({ partial, cents, weight }) => ({
      w: weight / meanWeight,
      r: cents - shift(partial, b, lnB),
      g: slope(partial, b, lnB),
    }));
    f1Cents = rows.reduce((sum, { w, r }) => sum + w * r, 0) / total;
    slopeMean = rows.reduce((sum, { w, g }) => sum + w * g, 0) / total;
    information = rows.reduce((sum, { w, g }) => sum + w * (g - slopeMean) ** 2, 0);
    squares = rows.reduce((sum, { w, r }) => sum + w * (r - f1Cents) ** 2, 0);
    const gradient = rows.reduce((sum, { w, r, g }) => sum + w * (g - slopeMean) * (r - f1Cents), 0);
    const step = Math.min(Math.max(gradient / information, -0.5), 0.5);
    if (Math.abs(step) < 1e-12) break;
    lnB = Math.min(Math.max(lnB + step, -6), 6);
  }
  const dof = total - 2;
  return {
    f1Cents,
    lnB,
    f1Factor: 1 / total + slopeMean ** 2 / information,
    lnBFactor: 1 / information,
    variance: dof > 0 ? squares / dof : 0,
    dof,
    partials: moves.map(({ partial }) => partial),
  };
}

function shift(n: number, b: number, lnB: number): number {
  return inharmonicCents(n, b * Math.exp(lnB / 2)) - inharmonicCents(n, b * Math.exp(-lnB / 2));
}

function slope(n: number, b: number, lnB: number): number {
  const after = b * Math.exp(lnB / 2);
  const before = b * Math.exp(-lnB / 2);
  return 0.5 * (after * inharmonicCentsSlope(n, after) + before * inharmonicCentsSlope(n, before));
}

/** The move farthest from what the others say, when that is too far to be chance. */
function worstMove(moves: readonly Move[], whole: Difference, b: number): Move | null {
  let worst: Move | null = null;
  let worstRatio = 1;
  for (const move of moves) {
    const others = solveDifference(
      moves.filter((other) => other !== move),
      b,
    );
    const explained = whole.variance * whole.dof - others.variance * others.dof;
    const dof = ASSUMED_DOF + others.dof;
    const scale = (ASSUMED_DOF * ASSUMED_MOVE_SIGMA ** 2 + others.dof * others.variance) / dof;
    const ratio = Math.sqrt(Math.max(0, explained) / scale) / studentQuantile(REJECTION_LEVEL, dof);
    if (ratio > worstRatio) {
      worst = move;
      worstRatio = ratio;
    }
  }
  return worst;
}
