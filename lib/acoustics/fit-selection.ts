import { chiSquareUpperTail, normalQuantile, studentQuantile } from "./distributions";
import {
  curveVariance,
  LARGEST_B,
  regressionStart,
  residualAt,
  type Sheet,
  type Solution,
  solve,
} from "./fit-core";
import { REJECTION_PRIOR_DOF, TYPICAL_LN_B_SIGMA } from "./fit-prior";

/** One clean reading in a thousand is taken for an outlier. */
export const REJECTION_LEVEL = 1e-3;
/** χ² so high that outliers may be hiding one another, when σ is given; and per degree of freedom, when it is assumed. */
const MASKING_LEVEL = 1e-3;
const MASKING_SCALE = 9;
/** χ² by which the best explanation must beat the next one not to be called ambiguous. */
const CLEAR_LEAD = 2;
const MOST_ROUNDS = 12;

export type SelectionInput = {
  sheet: Sheet;
  /** 1 for readings whose σ is assumed rather than given. */
  assumed: Uint8Array;
  /** 1 for readings that take part in the fit at all. */
  open: Uint8Array;
  /** 1 for readings a person keeps. */
  kept: Uint8Array;
  typicalB: number;
};

export type Selection = {
  mask: Uint8Array;
  solution: Solution;
  /** More than one reading could be the wrong one. */
  ambiguous: boolean;
};

/**
 * How far reading `i` is from the curve of the others (deleted residual; Cook & Weisberg, Residuals and Influence in
 * Regression, 1982), as a multiple of the distance at which it is rejected: above 1 is off the curve. σ is the given
 * one, or the assumed one scaled by what the other readings show, the assumption weighing as REJECTION_PRIOR_DOF.
 */
export function offCurveRatio(
  input: SelectionInput,
  mask: Uint8Array,
  solution: Solution,
  i: number,
): number {
  const { sheet, assumed } = input;
  const w = sheet.weights[i] ?? 0;
  const inside = mask[i] === 1;
  const leverage = w * curveVariance(sheet.squares[i] ?? 0, solution);
  const left = inside ? 1 - leverage : 1 + leverage;
  if (!(left > 1e-9)) return 0;
  const r = residualAt(sheet, i, solution);
  const squareZ = (w * r * r) / left;
  if (assumed[i] !== 1) return Math.sqrt(squareZ) / normalQuantile(REJECTION_LEVEL);
  const othersDof = Math.max(0, solution.used - 2 - (inside ? 1 : 0));
  const othersChi2 = Math.max(0, solution.chi2 - (inside ? squareZ : 0));
  const dof = REJECTION_PRIOR_DOF + othersDof;
  const scale = (REJECTION_PRIOR_DOF + othersChi2) / dof;
  return Math.sqrt(squareZ / scale) / studentQuantile(REJECTION_LEVEL, dof);
}

/**
 * Choose which readings to believe. Clean sheets leave after one fit. Otherwise two searches compete: taking out the
 * reading whose absence helps most, one by one; and growing outwards from every pair of readings, which sees through
 * outliers that hide one another. The one under which the whole sheet is likelier wins.
 */
export function select(input: SelectionInput): Selection {
  const { sheet, open } = input;
  const whole = solve(sheet, open, regressionStart(sheet, open));
  if (whole.used < 3 || (looksClean(input, open, whole) && !mayHide(input, whole))) {
    return { mask: open.slice(), solution: whole, ambiguous: false };
  }
  const stepped = stepwise(input, whole);
  const dof = stepped.solution.used - 2;
  const settled = chiSquareUpperTail(loss(input, stepped.solution), dof) > MASKING_LEVEL;
  if (settled || whole.used < 5) return stepped;
  const grown = fromPairs(input);
  return grown && loss(input, grown.solution) < loss(input, stepped.solution) - 1e-9 ? grown : stepped;
}

function looksClean(input: SelectionInput, mask: Uint8Array, solution: Solution): boolean {
  for (let i = 0; i < input.sheet.count; i += 1) {
    if (mask[i] === 1 && input.kept[i] !== 1 && offCurveRatio(input, mask, solution, i) > 1) return false;
  }
  return true;
}

function mayHide({ sheet, assumed, open }: SelectionInput, { chi2, used }: Solution): boolean {
  const dof = used - 2;
  for (let i = 0; i < sheet.count; i += 1) {
    if (open[i] === 1 && assumed[i] === 1) return chi2 > MASKING_SCALE * dof;
  }
  return chiSquareUpperTail(chi2, dof) < MASKING_LEVEL;
}

/**
 * Misfit of the whole sheet to a curve: squared distances in σ, held at the rejection limit for a given σ
 * (a truncated square), and growing with their logarithm for an assumed one (Student's t with 4 degrees of freedom).
 */
function loss({ sheet, open, assumed, kept }: SelectionInput, curve: Pick<Solution, "c" | "b">): number {
  const limit = normalQuantile(REJECTION_LEVEL) ** 2;
  let total = 0;
  for (let i = 0; i < sheet.count; i += 1) {
    if (open[i] !== 1) continue;
    const r = residualAt(sheet, i, curve);
    const square = (sheet.weights[i] ?? 0) * r * r;
    if (kept[i] === 1) total += square;
    else if (assumed[i] === 1) total += (REJECTION_PRIOR_DOF + 1) * Math.log1p(square / REJECTION_PRIOR_DOF);
    else total += Math.min(square, limit);
  }
  return total;
}

/** How untypical of its key a B is, in units of χ²; bounded, so that it only decides between equals. */
function surprise(b: number, typicalB: number): number {
  const distance = b > 0 ? Math.log(b / typicalB) / TYPICAL_LN_B_SIGMA : Number.POSITIVE_INFINITY;
  return Math.min(distance * distance, 16);
}

function stepwise(input: SelectionInput, whole: Solution): Selection {
  const { sheet, kept, typicalB } = input;
  const mask = input.open.slice();
  let solution = whole;
  let ambiguous = false;
  while (solution.used > 2 && !looksClean(input, mask, solution)) {
    // With one or two readings to spare the data cannot tell which is wrong: what is usual for the key helps.
    const helpless = solution.used <= 4;
    let best = -1;
    let bestScore = Number.POSITIVE_INFINITY;
    let nextScore = Number.POSITIVE_INFINITY;
    let bestSolution = solution;
    for (let i = 0; i < sheet.count; i += 1) {
      if (mask[i] !== 1) continue;
      const without = solve(sheet, mask, regressionStart(sheet, mask, i), i);
      const score = without.chi2 + (helpless ? surprise(without.b, typicalB) : 0);
      if (score < bestScore) {
        nextScore = bestScore;
        bestScore = score;
        best = i;
        bestSolution = without;
      } else if (score < nextScore) nextScore = score;
    }
    const lead = nextScore - bestScore;
    if (best < 0 || kept[best] === 1) {
      best = worstFree(input, mask, solution);
      if (best < 0) break;
      bestSolution = solve(sheet, mask, solution.b, best);
    } else if (solution.used === 3 && lead < 2 * CLEAR_LEAD) {
      return { mask, solution, ambiguous: true };
    } else if (lead < CLEAR_LEAD) ambiguous = true;
    mask[best] = 0;
    solution = bestSolution;
  }
  return settle(input, mask, solution, ambiguous);
}

function worstFree(input: SelectionInput, mask: Uint8Array, solution: Solution): number {
  let worst = -1;
  let worstRatio = 1;
  for (let i = 0; i < input.sheet.count; i += 1) {
    if (mask[i] !== 1 || input.kept[i] === 1) continue;
    const ratio = offCurveRatio(input, mask, solution, i);
    if (ratio > worstRatio) {
      worst = i;
      worstRatio = ratio;
    }
  }
  return worst;
}

/** Take back readings that the curve of the others explains after all, and drop those it does not. */
function settle(input: SelectionInput, start: Uint8Array, first: Solution, ambiguous: boolean): Selection {
  const { sheet, open, kept } = input;
  let mask = start;
  let solution = first;
  for (let round = 0; round < MOST_ROUNDS; round += 1) {
    const next = mask.slice();
    let changed = false;
    let used = 0;
    for (let i = 0; i < sheet.count; i += 1) {
      if (open[i] !== 1) continue;
      const wanted = kept[i] === 1 || offCurveRatio(input, mask, solution, i) <= 1 ? 1 : 0;
      if (wanted !== mask[i]) changed = true;
      next[i] = wanted;
      used += wanted;
    }
    if (!changed || used < 3) break;
    mask = next;
    solution = solve(sheet, mask, solution.b);
  }
  return { mask, solution, ambiguous };
}

/** The pair of readings whose curve explains the sheet best, grown to all the readings that lie on it. */
function fromPairs(input: SelectionInput): Selection | null {
  const { sheet, open } = input;
  let best: { c: number; b: number } | null = null;
  let bestLoss = Number.POSITIVE_INFINITY;
  for (let i = 0; i < sheet.count; i += 1) {
    for (let j = i + 1; j < sheet.count; j += 1) {
      if (open[i] !== 1 || open[j] !== 1) continue;
      const curve = throughPair(sheet, i, j);
      if (!curve) continue;
      const pairLoss = loss(input, curve);
      if (pairLoss < bestLoss) {
        bestLoss = pairLoss;
        best = curve;
      }
    }
  }
  if (!best) return null;
  const mask = new Uint8Array(sheet.count);
  const near = 2 * normalQuantile(REJECTION_LEVEL);
  let used = 0;
  for (let i = 0; i < sheet.count; i += 1) {
    const r = residualAt(sheet, i, best);
    const close = Math.abs(r) * Math.sqrt(sheet.weights[i] ?? 0) <= near;
    if (open[i] === 1 && (close || input.kept[i] === 1)) {
      mask[i] = 1;
      used += 1;
    }
  }
  if (used < 3) return null;
  return settle(input, mask, solve(sheet, mask, best.b), false);
}

function throughPair(sheet: Sheet, i: number, j: number): { c: number; b: number } | null {
  const low = sheet.squares[i] ?? 0;
  const high = sheet.squares[j] ?? 0;
  const r = 2 ** (((sheet.cents[j] ?? 0) - (sheet.cents[i] ?? 0)) / 600);
  const b = (r - 1) / (high - r * low);
  if (!(b > -1e-3 && b < LARGEST_B && 1 + b * Math.max(low, high) > 0)) return null;
  return { b, c: residualAt(sheet, i, { c: 0, b }) };
}
