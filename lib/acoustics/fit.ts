import { checkFitInput } from "./checks-of-input";
import { normalQuantile, studentQuantile } from "./distributions";
import { curveVariance, residualAt, type Solution, solve } from "./fit-core";
import { assumedSigma, INTERVAL_PRIOR_DOF, LAST_KEY_WITH_WEAK_FIRST_PARTIAL } from "./fit-prior";
import { qualityOf, scattersTooMuch } from "./fit-quality";
import { rejectionOf } from "./fit-reasons";
import { offCurveRatio, type Selection, select } from "./fit-selection";
import { fitOneReading } from "./fit-single";
import { distinctPartials, type FitState, prepare, takingPart } from "./fit-state";
import type { FitInput, FitResult, FitWarning, Reading, Rejection } from "./types";

/** No sheet is better than this, cents: typed digits and the tuning instrument itself. */
const SIGMA_FLOOR = 0.05;

/**
 * Fit f1 and B of one string to its partial readings.
 *
 * Weighted least squares of 1200·log2(f_n / model) over (ln f1, B), f_n = n·f1·sqrt((1 + B·n²)/(1 + B)) (Fletcher 1964),
 * on the accepted readings; deleted residuals only choose which are accepted (`fit-selection`).
 *
 * Input: `readings` of one string, each `hz` (above 0) or `cents` from n times the note's equal-tempered frequency, with an
 * optional σ in cents that is believed. Where σ is absent it is estimated from the residuals and what is usual for the key.
 * `kept` and `dropped` partials follow the person's choice. Partials above `maxPartial` (16) are left out when at least
 * three others remain.
 *
 * Result: f1 in Hz, σ of f1 in cents, B without unit, its σ and 95 % interval (normal when every σ was given, else
 * Student's t), the correlation of f1 and B, χ² for the given or assumed σ, and per reading its distance from the curve in cents. With one reading B is
 * null. B may be negative within its error.
 *
 * Errors: AcousticsError, see `checkFitInput`; "all-dropped" when no reading is left.
 */
export function fit(input: FitInput): FitResult {
  checkFitInput(input);
  const state = prepare(input);
  const chosen = distinctPartials(input.readings, state) < 2 ? null : choose(state);
  return chosen === null ? fitOneReading(input.readings, state) : report(input, state, chosen);
}

type Chosen = Selection & { scatters: boolean };

/** Choose the readings; null when only one can be believed. */
function choose(state: FitState): Chosen | null {
  const selection = select(state);
  const { solution } = selection;
  const total = takingPart(state);
  if (total === 2 && solution.chi2 > 1e-6) return null;
  const tooMany = Math.max(1, total / 3);
  if (!state.sigmaGiven || total - solution.used <= tooMany) return { ...selection, scatters: false };
  // So many outliers at once mean that the given σ leaves out the string's own irregularity: judge with it.
  const usual = assumedSigma(state.midi);
  const weights = state.sheet.weights.map((w) => 1 / (1 / w + usual * usual));
  const wider = select({ ...state, sheet: { ...state.sheet, weights } });
  if (wider.solution.used <= solution.used) return { ...selection, scatters: false };
  return { ...wider, solution: solve(state.sheet, wider.mask, wider.solution.b), scatters: true };
}

/** Scale of the assumed σ from the residuals, and the degrees of freedom behind it; the sheet's weights follow the scale. */
function scaleAssumed(
  state: FitState,
  mask: Uint8Array,
  first: Solution,
): { solution: Solution; dof: number } {
  const { assumed } = state;
  const weights = state.sheet.weights.slice();
  const sheet = { ...state.sheet, weights };
  const floor = (SIGMA_FLOOR / assumedSigma(state.midi)) ** 2;
  let solution = first;
  let dof = INTERVAL_PRIOR_DOF;
  const allAssumed = mask.every((used, i) => used !== 1 || assumed[i] === 1);
  const rounds = allAssumed ? 1 : 8;
  for (let round = 0; round < rounds; round += 1) {
    let own = 0;
    let chi2 = 0;
    for (let i = 0; i < sheet.count; i += 1) {
      if (mask[i] !== 1 || assumed[i] !== 1) continue;
      const r = residualAt(sheet, i, solution);
      own += 1 - (weights[i] ?? 0) * curveVariance(sheet.squares[i] ?? 0, solution);
      chi2 += (state.sheet.weights[i] ?? 0) * r * r;
    }
    if (allAssumed) own = solution.used - 2;
    const prior = Math.max(0, INTERVAL_PRIOR_DOF - own);
    dof = prior + own;
    const scale = Math.max(floor, (prior + chi2) / dof);
    for (let i = 0; i < sheet.count; i += 1) {
      if (assumed[i] === 1) weights[i] = (state.sheet.weights[i] ?? 0) / scale;
    }
    solution = solve(sheet, mask, solution.b);
  }
  return { solution, dof };
}

function report(
  input: FitInput,
  state: FitState,
  { mask, solution, ambiguous, scatters }: Chosen,
): FitResult {
  const { readings } = input;
  const { sheet, midi, sigmaGiven } = state;
  const scaled = sigmaGiven
    ? { solution, dof: Number.POSITIVE_INFINITY }
    : scaleAssumed(state, mask, solution);
  const { b, c, weightSum, slopeMean, information } = scaled.solution;
  const f1Hz = 2 ** (c / 1200);
  const f1Variance = 1 / weightSum + (slopeMean * slopeMean) / information;
  const bSigma = Math.sqrt(1 / information);
  const t = sigmaGiven ? normalQuantile(0.05) : studentQuantile(0.05, scaled.dof);

  const used: number[] = [];
  const rejected: Rejection[] = [];
  const residuals: FitResult["residuals"] = [];
  let keptOffCurve = false;
  let nMax = 0;
  let squares = 0;
  let chi2 = 0;
  for (let i = 0; i < sheet.count; i += 1) {
    const partial = readings[i]?.partial ?? 0;
    const cents = residualAt(sheet, i, scaled.solution);
    residuals.push({ partial, cents });
    if (mask[i] === 1) {
      used.push(partial);
      if (partial > nMax) nMax = partial;
      squares += cents * cents;
      chi2 += (sheet.weights[i] ?? 0) * cents * cents;
      if (state.kept[i] === 1 && offCurveRatio(state, mask, solution, i) > 1) keptOffCurve = true;
    } else rejected.push(rejectionOf(partial, cents, state, i, { f1Hz, b }));
  }
  const dof = used.length - 2;
  const rmsCents = Math.sqrt(squares / used.length);

  const warnings: FitWarning[] = [];
  if (dof === 0) warnings.push("exact-no-check");
  if (dof === 1) warnings.push("few-partials");
  if (b - t * bSigma <= 0) warnings.push("b-not-significant");
  if (hangsOnFirstPartial(state, mask, scaled.solution, readings)) warnings.push("first-partial-unreliable");
  if (keptOffCurve) warnings.push("kept-off-curve");
  if (ambiguous) warnings.push("ambiguous-outlier");
  if (scatters || scattersTooMuch({ chi2, dof, rmsCents }, midi, sigmaGiven)) {
    warnings.push("scatter-exceeds-sigma");
  }
  const result: FitResult = {
    f1Hz,
    f1SigmaCents: Math.sqrt(f1Variance),
    b,
    bSigma,
    bLow: b - t * bSigma,
    bHigh: b + t * bSigma,
    correlation: -slopeMean / Math.sqrt(f1Variance * information),
    rmsCents,
    chi2,
    dof,
    nMax,
    used,
    rejected,
    residuals,
    quality: "usable",
    warnings,
  };
  result.quality = qualityOf(result);
  return result;
}

/** In the bass the first partial is weak: says when more than half of f1 rests on it alone. */
function hangsOnFirstPartial(
  { sheet, midi }: FitState,
  mask: Uint8Array,
  { weightSum, slopeMean, information }: Solution,
  readings: readonly Reading[],
): boolean {
  if (midi > LAST_KEY_WITH_WEAK_FIRST_PARTIAL) return false;
  const i = readings.findIndex(({ partial }, index) => partial === 1 && mask[index] === 1);
  if (i < 0) return false;
  // dI_1/dB is 0, so the first partial stands one mean slope away from the centre.
  const share = (sheet.weights[i] ?? 0) * (1 / weightSum + (slopeMean * slopeMean) / information);
  return share > 0.5;
}
