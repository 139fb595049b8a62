/**
 * Small dense and banded Cholesky kernels on row-major Float64Array. Every routine works in place.
 * Source: Golub & Van Loan, Matrix Computations, ch. 4 (from memory).
 */

/** Element of a typed array; an index out of range gives NaN, which surfaces in the result instead of hiding. */
export const at = (values: Float64Array, index: number): number => values[index] ?? Number.NaN;

/** Inner product of `length` elements from offset i of `left` and j of `right`. */
export function dot(left: Float64Array, i: number, right: Float64Array, j: number, length: number): number {
  let sum = 0;
  for (let k = 0; k < length; k += 1) sum += at(left, i + k) * at(right, j + k);
  return sum;
}

/** Product of two n × n row-major matrices, two inner terms a pass: memory traffic bounds this loop. */
export function product(left: Float64Array, right: Float64Array, n: number): Float64Array {
  const result = new Float64Array(n * n);
  for (let row = 0; row < n * n; row += n) {
    let j = 0;
    for (; j + 1 < n; j += 2) {
      const first = at(left, row + j);
      const second = at(left, row + j + 1);
      const source = j * n;
      for (let i = 0; i < n; i += 1) {
        result[row + i] =
          at(result, row + i) + first * at(right, source + i) + second * at(right, source + n + i);
      }
    }
    if (j < n) {
      const last = at(left, row + j);
      for (let i = 0; i < n; i += 1) result[row + i] = at(result, row + i) + last * at(right, j * n + i);
    }
  }
  return result;
}

/** Adds scale·v·vᵀ to the lower triangle of an n × n matrix, v given by its non-zero elements. */
export function addSparseOuter(
  matrix: Float64Array,
  n: number,
  vector: ReadonlyMap<number, number>,
  scale: number,
): void {
  for (const [row, left] of vector) {
    for (const [column, right] of vector) {
      if (column > row) continue;
      matrix[row * n + column] = at(matrix, row * n + column) + scale * left * right;
    }
  }
}

/** Adds the square of each element of `vector` to `sums`. */
export function addSquares(sums: Float64Array, vector: Float64Array): void {
  for (let i = 0; i < sums.length; i += 1) sums[i] = at(sums, i) + at(vector, i) ** 2;
}

/** Column k of a lower triangle, zeros above the diagonal. */
export function lowerColumn(matrix: Float64Array, n: number, k: number): Float64Array {
  const column = new Float64Array(n);
  for (let i = k; i < n; i += 1) column[i] = at(matrix, i * n + k);
  return column;
}

/** Sums of products down the columns of two n × n row-major matrices: the diagonal of leftᵀ·right. */
export function columnDots(left: Float64Array, right: Float64Array, n: number): Float64Array {
  const sums = new Float64Array(n);
  for (let row = 0; row < n * n; row += n) {
    for (let i = 0; i < n; i += 1) sums[i] = at(sums, i) + at(left, row + i) * at(right, row + i);
  }
  return sums;
}

/** Thrown when a matrix is not positive definite: the caller says what that means for its subject. */
export class NotPositiveDefinite extends Error {
  constructor(readonly row: number) {
    super(`Matrix is not positive definite at row ${row}`);
    this.name = "NotPositiveDefinite";
  }
}

/** Replaces the lower triangle of the n × n matrix by its Cholesky factor; the upper triangle is left alone. */
export function choleskyInPlace(matrix: Float64Array, n: number): void {
  for (let i = 0; i < n; i += 1) {
    const rowI = i * n;
    for (let j = 0; j <= i; j += 1) {
      const rowJ = j * n;
      let sum = at(matrix, rowI + j);
      for (let k = 0; k < j; k += 1) sum -= at(matrix, rowI + k) * at(matrix, rowJ + k);
      if (i === j) {
        if (!(sum > 0)) throw new NotPositiveDefinite(i);
        matrix[rowI + i] = Math.sqrt(sum);
      } else {
        matrix[rowI + j] = sum / at(matrix, rowJ + j);
      }
    }
  }
}

/**
 * Cholesky factor of a positive semidefinite matrix in place, lower triangle: a pivot that vanishes against its original
 * diagonal gives a column of zeros.
 */
export function choleskySemidefiniteInPlace(matrix: Float64Array, n: number): void {
  for (let j = 0; j < n; j += 1) {
    const rowJ = j * n;
    const original = at(matrix, rowJ + j);
    let pivot = original;
    for (let k = 0; k < j; k += 1) pivot -= at(matrix, rowJ + k) ** 2;
    const vanishes = !(pivot > 1e-12 * original);
    const root = vanishes ? 0 : Math.sqrt(pivot);
    matrix[rowJ + j] = root;
    for (let i = j + 1; i < n; i += 1) {
      const rowI = i * n;
      let sum = at(matrix, rowI + j);
      for (let k = 0; k < j; k += 1) sum -= at(matrix, rowI + k) * at(matrix, rowJ + k);
      matrix[rowI + j] = vanishes ? 0 : sum / root;
    }
  }
}

/** Solves L y = b in place, b at `offset` of `vector`. */
export function forwardSolve(factor: Float64Array, n: number, vector: Float64Array, offset = 0): void {
  for (let i = 0; i < n; i += 1) {
    const row = i * n;
    let sum = at(vector, offset + i);
    for (let k = 0; k < i; k += 1) sum -= at(factor, row + k) * at(vector, offset + k);
    vector[offset + i] = sum / at(factor, row + i);
  }
}

/** Solves Lᵀ x = y in place, y at `offset` of `vector`. */
export function backwardSolve(factor: Float64Array, n: number, vector: Float64Array, offset = 0): void {
  for (let i = n - 1; i >= 0; i -= 1) {
    const row = i * n;
    const value = at(vector, offset + i) / at(factor, row + i);
    vector[offset + i] = value;
    for (let k = 0; k < i; k += 1) {
      vector[offset + k] = at(vector, offset + k) - at(factor, row + k) * value;
    }
  }
}

/** (L⁻¹)ᵀ of a Cholesky factor: row i holds column i of L⁻¹, zero left of the diagonal. */
export function transposedInverseOfFactor(factor: Float64Array, n: number): Float64Array {
  const inverse = new Float64Array(n * n);
  for (let column = 0; column < n; column += 1) {
    const row = column * n;
    inverse[row + column] = 1 / at(factor, column * n + column);
    for (let i = column + 1; i < n; i += 1) {
      const sum = dot(factor, i * n + column, inverse, row + column, i - column);
      inverse[row + i] = -sum / at(factor, i * n + i);
    }
  }
  return inverse;
}

/** Sum of the logarithms of the squared diagonal of a Cholesky factor: ln det of the matrix it came from. */
export function logDeterminant(factor: Float64Array, n: number): number {
  let sum = 0;
  for (let i = 0; i < n; i += 1) sum += Math.log(at(factor, i * n + i));
  return 2 * sum;
}

/** Symmetric band matrix: element (i, j), j ≤ i, i − j ≤ width, is at i·(width + 1) + (i − j). */
export type BandMatrix = { n: number; width: number; values: Float64Array };

export function bandMatrix(n: number, width: number): BandMatrix {
  return { n, width, values: new Float64Array(n * (width + 1)) };
}

/** Adds `value` to element (row, column) of a symmetric band matrix. */
export function addToBand(matrix: BandMatrix, row: number, column: number, value: number): void {
  const low = Math.min(row, column);
  const high = Math.max(row, column);
  const index = high * (matrix.width + 1) + (high - low);
  matrix.values[index] = at(matrix.values, index) + value;
}

/** Cholesky factor in place, n·width² operations. */
export function choleskyBandInPlace(matrix: BandMatrix): void {
  const { n, width, values } = matrix;
  const stride = width + 1;
  for (let i = 0; i < n; i += 1) {
    const first = Math.max(0, i - width);
    for (let j = first; j <= i; j += 1) {
      let sum = at(values, i * stride + i - j);
      const from = Math.max(first, j - width);
      for (let k = from; k < j; k += 1) {
        sum -= at(values, i * stride + i - k) * at(values, j * stride + j - k);
      }
      if (i === j) {
        if (!(sum > 0)) throw new NotPositiveDefinite(i);
        values[i * stride] = Math.sqrt(sum);
      } else {
        values[i * stride + i - j] = sum / at(values, j * stride);
      }
    }
  }
}

/** Solves A x = b in place with the factor of A, b at `offset` of `vector`; b is known to be zero before row `from`. */
export function solveBand(factor: BandMatrix, vector: Float64Array, offset = 0, from = 0): void {
  const { n, width, values } = factor;
  const stride = width + 1;
  for (let i = from; i < n; i += 1) {
    let sum = at(vector, offset + i);
    for (let k = Math.max(from, i - width); k < i; k += 1) {
      sum -= at(values, i * stride + i - k) * at(vector, offset + k);
    }
    vector[offset + i] = sum / at(values, i * stride);
  }
  for (let i = n - 1; i >= 0; i -= 1) {
    const value = at(vector, offset + i) / at(values, i * stride);
    vector[offset + i] = value;
    for (let k = Math.max(0, i - width); k < i; k += 1) {
      vector[offset + k] = at(vector, offset + k) - at(values, i * stride + i - k) * value;
    }
  }
}
