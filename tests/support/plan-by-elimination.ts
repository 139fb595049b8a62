/**
 * The stretch plan by dense Gaussian elimination on the equations as written: an independent way to the same minimum, which
 * also takes each partial's own departure from the law.
 */
import type { Style } from "@/lib/acoustics/types";

export type TrueKey = { midi: number; b: number; irregularity?: readonly number[] };

export function planByElimination(keys: readonly TrueKey[], style: Style, anchorMidi = 69): number[] {
  const n = keys.length;
  const position = new Map(keys.map(({ midi }, i) => [midi, i]));
  const lambda = style.smoothness > 0 ? style.smoothness : 1e-7;
  const matrix = keys.map(() => new Array<number>(n + 1).fill(0));
  const add = (row: number, column: number, value: number) => {
    const line = matrix[row];
    if (line) line[column] = (line[column] ?? 0) + value;
  };
  const equation = (entries: readonly [number, number][], right: number, weight: number) => {
    for (const [row, a] of entries) {
      for (const [column, c] of entries) add(row, column, weight * a * c);
      add(row, n, weight * a * right);
    }
  };
  for (const rule of style.intervals) {
    keys.forEach((lower, i) => {
      const j = position.get(lower.midi + rule.semitones);
      const upper = j === undefined ? undefined : keys[j];
      const weight = typeof rule.weights === "number" ? rule.weights : (rule.weights[i] ?? 0);
      if (j === undefined || upper === undefined) return;
      const rise = above(lower, rule.lowerPartial) - above(upper, rule.upperPartial);
      equation(
        [
          [j, 1],
          [i, -1],
        ],
        rise,
        weight,
      );
    });
  }
  for (let i = 1; i + 1 < n; i += 1)
    equation(
      [
        [i - 1, 1],
        [i, -2],
        [i + 1, 1],
      ],
      0,
      lambda,
    );
  const anchor = position.get(anchorMidi) ?? 0;
  equation([[anchor, 1]], 0, 1e7);
  return eliminate(matrix);
}

function above({ b, irregularity }: TrueKey, n: number): number {
  return 600 * Math.log2((1 + b * n * n) / (1 + b)) + (irregularity?.[n] ?? 0);
}

function eliminate(matrix: number[][]): number[] {
  const n = matrix.length;
  for (let column = 0; column < n; column += 1) {
    const pivot = matrix[column];
    if (!pivot) continue;
    for (let row = column + 1; row < n; row += 1) {
      const line = matrix[row];
      if (!line) continue;
      const factor = (line[column] ?? 0) / (pivot[column] ?? Number.NaN);
      for (let k = column; k <= n; k += 1) line[k] = (line[k] ?? 0) - factor * (pivot[k] ?? 0);
    }
  }
  const solution = new Array<number>(n).fill(0);
  for (let row = n - 1; row >= 0; row -= 1) {
    const line = matrix[row] ?? [];
    let value = line[n] ?? 0;
    for (let k = row + 1; k < n; k += 1) value -= (line[k] ?? 0) * (solution[k] ?? 0);
    solution[row] = value / (line[row] ?? Number.NaN);
  }
  return solution;
}
