import { CENTS_PER_LN_SQUARE } from "./partials";

/**
 * Least squares of one string, over C (cents of f1) and B: minimise Σ w·(y − C − I_n(B))².
 *
 * C is linear and is projected out (variable projection: Golub & Pereyra, SIAM J. Numer. Anal. 10 (1973) 413-432), so
 * one Gauss-Newton step is dB = Σ w·g·r / Σ w·g² with residual and derivative both centred on their weighted means.
 * Centring is the QR step of the two columns: no normal matrix is formed or inverted.
 */
export type Sheet = {
  count: number;
  /** n². */
  squares: Float64Array;
  /** Cents of f_n/n above an arbitrary common reference. */
  cents: Float64Array;
  /** 1/σ². */
  weights: Float64Array;
};

export type Solution = {
  /** Cents of f1 above the sheet's reference. */
  c: number;
  b: number;
  /** Σ w over the readings used. */
  weightSum: number;
  /** Weighted mean of dI_n/dB. */
  slopeMean: number;
  /** Σ w·(dI_n/dB − slopeMean)²: the information about B. */
  information: number;
  chi2: number;
  used: number;
  iterations: number;
};

/** Highest B any piano string comes near: C8 is about 0.02. */
export const LARGEST_B = 0.3;
const MOST_ITERATIONS = 60;
/** What is left of the error when the iteration stops, as a share of B. */
const PRECISION = 1e-9;

/** Lowest B tried: keeps 1 + B·n² well above 0 for every partial of the sheet. */
function smallestB(largestSquare: number): number {
  return -0.5 / largestSquare;
}

/**
 * B from the weighted linear regression of (f_n/n)² on n², the start of the iteration. `mask[i]` is 1 for the
 * readings to use; `skip` leaves one more out. Zero when the line has no usable B.
 */
export function regressionStart(sheet: Sheet, mask: Uint8Array, skip = -1): number {
  const { count, squares, cents, weights } = sheet;
  let sum = 0;
  let sumX = 0;
  let sumY = 0;
  for (let i = 0; i < count; i += 1) {
    if (mask[i] !== 1 || i === skip) continue;
    const w = weights[i] ?? 0;
    sum += w;
    sumX += w * (squares[i] ?? 0);
    sumY += w * (cents[i] ?? 0);
  }
  const meanX = sumX / sum;
  const centre = sumY / sum;
  let top = 0;
  let bottom = 0;
  let meanLevel = 0;
  for (let i = 0; i < count; i += 1) {
    if (mask[i] !== 1 || i === skip) continue;
    const w = weights[i] ?? 0;
    const x = (squares[i] ?? 0) - meanX;
    const level = Math.exp(((cents[i] ?? 0) - centre) / CENTS_PER_LN_SQUARE);
    top += w * x * level;
    bottom += w * x * x;
    meanLevel += w * level;
  }
  const slope = top / bottom;
  const b = slope / (meanLevel / sum - slope * meanX);
  return Number.isFinite(b) && b > -0.01 && b < LARGEST_B ? b : 0;
}

/** Scratch for one solve; sheets are small, and a page solves many in a row. */
let scratch = new Float64Array(64);

/**
 * Solve from `startB`. At least two readings with different partial numbers must be used.
 * A step that raises χ² is halved; B stays within (`smallestB`, `LARGEST_B`).
 */
export function solve(sheet: Sheet, mask: Uint8Array, startB: number, skip = -1): Solution {
  const { count, squares, cents, weights } = sheet;
  if (scratch.length < 2 * count) scratch = new Float64Array(4 * count);
  const work = scratch;
  let used = 0;
  let largest = 1;
  for (let i = 0; i < count; i += 1) {
    if (mask[i] !== 1 || i === skip) continue;
    used += 1;
    const square = squares[i] ?? 0;
    if (square > largest) largest = square;
  }
  const lowest = smallestB(largest);
  let b = Math.min(Math.max(startB, lowest), LARGEST_B);
  let previousB = b;
  let previousChi2 = Number.POSITIVE_INFINITY;
  let previousStep = 0;
  let c = 0;
  let weightSum = 0;
  let slopeMean = 0;
  let information = 0;
  let chi2 = 0;
  let iterations = 0;
  for (;;) {
    iterations += 1;
    weightSum = 0;
    let sumR = 0;
    let sumG = 0;
    const onePlusB = 1 + b;
    const slopeFactor = CENTS_PER_LN_SQUARE / onePlusB;
    for (let i = 0; i < count; i += 1) {
      if (mask[i] !== 1 || i === skip) continue;
      const square = squares[i] ?? 0;
      const w = weights[i] ?? 0;
      const stiff = 1 + b * square;
      const r = (cents[i] ?? 0) - CENTS_PER_LN_SQUARE * Math.log(stiff / onePlusB);
      const g = (slopeFactor * (square - 1)) / stiff;
      work[2 * i] = r;
      work[2 * i + 1] = g;
      weightSum += w;
      sumR += w * r;
      sumG += w * g;
    }
    c = sumR / weightSum;
    slopeMean = sumG / weightSum;
    information = 0;
    chi2 = 0;
    let gradient = 0;
    for (let i = 0; i < count; i += 1) {
      if (mask[i] !== 1 || i === skip) continue;
      const w = weights[i] ?? 0;
      const r = (work[2 * i] ?? 0) - c;
      const g = (work[2 * i + 1] ?? 0) - slopeMean;
      information += w * g * g;
      gradient += w * g * r;
      chi2 += w * r * r;
    }
    if (iterations >= MOST_ITERATIONS || !(information > 0)) break;
    const rounding = 1e-9 * previousChi2 + 1e-18 * weightSum;
    if (chi2 > previousChi2 + rounding && Math.abs(b - previousB) > 1e-13) {
      b = 0.5 * (b + previousB);
      continue;
    }
    const step = gradient / information;
    const contraction = Math.min(1, Math.abs(step / previousStep));
    if (Math.abs(step) * contraction <= PRECISION * Math.abs(b) + 1e-15) {
      // The next step would be this one times the contraction: taking it to first order is precise enough.
      b += step;
      c -= slopeMean * step;
      chi2 = Math.max(0, chi2 - gradient * step);
      break;
    }
    previousStep = step;
    const next = Math.min(Math.max(b + step, 0.5 * (b + lowest)), 0.5 * (b + LARGEST_B));
    previousB = b;
    previousChi2 = chi2;
    b = next;
  }
  return { c, b, weightSum, slopeMean, information, chi2, used, iterations };
}

/**
 * 1 + B·n², kept above 0 for a reading outside the fit whose partial lies where a negative B has no meaning any more:
 * its distance from the curve is then very large, not undefined.
 */
function stiffening(b: number, square: number): number {
  return Math.max(1 + b * square, 1e-6);
}

/** Residual of reading `i` in cents from a solution. */
export function residualAt(sheet: Sheet, i: number, { c, b }: Pick<Solution, "c" | "b">): number {
  const square = sheet.squares[i] ?? 0;
  return (sheet.cents[i] ?? 0) - c - CENTS_PER_LN_SQUARE * Math.log(stiffening(b, square) / (1 + b));
}

/** Variance of the curve at partial² `square`, in cents² per unit of scale: from C, B and their covariance. */
export function curveVariance(square: number, solution: Solution): number {
  const { b, weightSum, slopeMean, information } = solution;
  const g = (CENTS_PER_LN_SQUARE * (square - 1)) / (stiffening(b, square) * (1 + b)) - slopeMean;
  return 1 / weightSum + (g * g) / information;
}
