import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  addToBand,
  at,
  backwardSolve,
  bandMatrix,
  choleskyBandInPlace,
  choleskyInPlace,
  choleskySemidefiniteInPlace,
  forwardSolve,
  logDeterminant,
  NotPositiveDefinite,
  solveBand,
} from "./linear-algebra";

const entries = (length: number) =>
  fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: length, maxLength: length });

/** A·Aᵀ + I of a band matrix A is positive definite with the same number of diagonals. */
function positiveDefinite(n: number, width: number, values: readonly number[]): Float64Array {
  const root = new Float64Array(n * n);
  for (let i = 0; i < n; i += 1) {
    for (let j = Math.max(0, i - width); j <= i; j += 1) root[i * n + j] = values[i * n + j] ?? 0;
  }
  const matrix = new Float64Array(n * n);
  for (let i = 0; i < n; i += 1) {
    for (let j = 0; j < n; j += 1) {
      let sum = i === j ? 1 : 0;
      for (let k = 0; k < n; k += 1) sum += at(root, i * n + k) * at(root, j * n + k);
      matrix[i * n + j] = sum;
    }
  }
  return matrix;
}

function times(matrix: Float64Array, n: number, vector: ArrayLike<number>): number[] {
  return Array.from({ length: n }, (_, i) =>
    Array.from(vector).reduce((sum, value, j) => sum + at(matrix, i * n + j) * value, 0),
  );
}

describe("Cholesky solves", () => {
  const n = 9;
  const width = 3;

  it("give back the vector a matrix was applied to, dense and banded alike", () => {
    fc.assert(
      fc.property(entries(n * n), entries(n), (values, wanted) => {
        const matrix = positiveDefinite(n, width, values);
        const dense = Float64Array.from(matrix);
        choleskyInPlace(dense, n);
        const x = Float64Array.from(times(matrix, n, wanted));
        forwardSolve(dense, n, x);
        backwardSolve(dense, n, x);

        const band = bandMatrix(n, width);
        for (let i = 0; i < n; i += 1) {
          for (let j = Math.max(0, i - width); j <= i; j += 1) addToBand(band, i, j, at(matrix, i * n + j));
        }
        choleskyBandInPlace(band);
        const y = Float64Array.from(times(matrix, n, wanted));
        solveBand(band, y);
        wanted.forEach((value, i) => {
          expect(at(x, i)).toBeCloseTo(value, 9);
          expect(at(y, i)).toBeCloseTo(value, 9);
        });
      }),
    );
  });

  it("know the determinant", () => {
    const factor = Float64Array.from([4, 2, 2, 3]);
    choleskyInPlace(factor, 2);
    expect(logDeterminant(factor, 2)).toBeCloseTo(Math.log(8), 12);
  });

  it("refuse a matrix that is not positive definite and name the row", () => {
    expect(() => choleskyInPlace(Float64Array.from([1, 0, 2, 1]), 2)).toThrow(NotPositiveDefinite);
    const band = bandMatrix(2, 1);
    addToBand(band, 0, 0, 1);
    addToBand(band, 1, 0, 2);
    addToBand(band, 1, 1, 1);
    expect(() => choleskyBandInPlace(band)).toThrow(/row 1/);
  });

  it("factor a matrix of less than full rank", () => {
    const vector = [1, -2, 0, 3];
    const matrix = Float64Array.from(vector.flatMap((a) => vector.map((b) => a * b)));
    choleskySemidefiniteInPlace(matrix, 4);
    for (let i = 0; i < 4; i += 1) {
      for (let j = 0; j <= i; j += 1) {
        let sum = 0;
        for (let k = 0; k <= j; k += 1) sum += at(matrix, i * 4 + k) * at(matrix, j * 4 + k);
        expect(sum).toBeCloseTo((vector[i] ?? 0) * (vector[j] ?? 0), 9);
      }
    }
  });
});
