/**
 * Benjamini–Hochberg adjusted p-values: rejecting all with an adjusted value ≤ q keeps the expected share of false
 * rejections ≤ q. Y. Benjamini, Y. Hochberg, "Controlling the false discovery rate", J. R. Stat. Soc. B 57 (1995) 289-300.
 * Takes p-values in any order and answers in the same order.
 */
export function adjustedPValues(pValues: readonly number[]): number[] {
  const count = pValues.length;
  const byFalling = pValues.map((p, index) => ({ p, index })).sort((left, right) => right.p - left.p);
  const adjusted = new Array<number>(count).fill(1);
  let smallest = 1;
  byFalling.forEach(({ p, index }, position) => {
    smallest = Math.min(smallest, (p * count) / (count - position));
    adjusted[index] = smallest;
  });
  return adjusted;
}
