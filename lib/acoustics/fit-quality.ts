import { chiSquareUpperTail } from "./distributions";
import { assumedSigma } from "./fit-prior";
import type { FitResult, Quality } from "./types";

type Judged = Pick<
  FitResult,
  "b" | "bSigma" | "bLow" | "bHigh" | "chi2" | "dof" | "rmsCents" | "used" | "rejected" | "warnings"
>;

/** How likely a scatter this large must be, under the given σ, to be believed. */
const SCATTER_LEVEL = 1e-3;

/** Whether the accepted readings scatter more than their σ, or three times more than is usual for the key. */
export function scattersTooMuch(
  result: Pick<FitResult, "chi2" | "dof" | "rmsCents">,
  midi: number,
  sigmaGiven: boolean,
): boolean {
  return sigmaGiven
    ? chiSquareUpperTail(result.chi2, result.dof) < SCATTER_LEVEL
    : result.rmsCents > 3 * assumedSigma(midi);
}

/**
 * One word for the sheet. `good`: checked by at least two readings to spare, B known to a tenth, nothing odd.
 * `repeat`: not to be relied on; read the note again. `usable`: in between.
 */
export function qualityOf(result: Judged): Quality {
  const { b, bSigma, bHigh, used, rejected } = result;
  const { warnings } = result;
  const mistakes = rejected.filter(({ reason }) => reason !== "dropped-by-hand" && reason !== "beyond-range");
  if (b === null || bSigma === null || bHigh === null || bHigh <= 0) return "repeat";
  if (warnings.includes("scatter-exceeds-sigma") || mistakes.length * 3 >= used.length + mistakes.length)
    return "repeat";
  const share = bSigma / Math.abs(b);
  // Two readings give B exactly: there is nothing by which a mistake could be seen.
  if (result.dof < 1) return "repeat";
  if (result.dof < 2 || share > 0.1 || mistakes.length > 1) return "usable";
  return warnings.includes("ambiguous-outlier") || warnings.includes("kept-off-curve") ? "usable" : "good";
}
