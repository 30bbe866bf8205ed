import { InputError, type Matrix, matrix } from "../../numeric/index.js";

/**
 * The inverse of a small square matrix by elimination with row exchanges.
 * @throws InputError when a pivot vanishes.
 */
export function inverse(a: Matrix): Matrix {
  const n = a.rows;
  const work = Float64Array.from(a.data);
  const result = matrix(n, n);
  for (let i = 0; i < n; i++) result.data[i * n + i] = 1;
  for (let p = 0; p < n; p++) {
    let best = p;
    for (let i = p + 1; i < n; i++) {
      if (Math.abs(work[p * n + i]!) > Math.abs(work[p * n + best]!)) best = i;
    }
    const pivot = work[p * n + best]!;
    if (!(Math.abs(pivot) > 0)) {
      throw new InputError(
        "covariance: the matrix to invert is singular: its columns depend on one another.",
      );
    }
    if (best !== p) {
      exchange(work, n, p, best);
      exchange(result.data, n, p, best);
    }
    for (let i = 0; i < n; i++) {
      if (i === p) continue;
      const factor = work[p * n + i]! / pivot;
      if (factor === 0) continue;
      for (let j = p; j < n; j++) work[j * n + i]! -= factor * work[j * n + p]!;
      for (let j = 0; j < n; j++) result.data[j * n + i]! -= factor * result.data[j * n + p]!;
    }
    for (let j = 0; j < n; j++) result.data[j * n + p]! /= pivot;
    for (let j = n - 1; j >= p; j--) work[j * n + p]! /= pivot;
  }
  return result;
}

function exchange(data: Float64Array, n: number, a: number, b: number): void {
  for (let j = 0; j < n; j++) {
    const held = data[j * n + a]!;
    data[j * n + a] = data[j * n + b]!;
    data[j * n + b] = held;
  }
}
