import { type Matrix, matrix } from "./matrix.js";

/** A symmetric matrix turned out not to be positive definite; `pivot` is the 0-based row where it showed. */
export class NotPositiveDefinite extends Error {
  override readonly name = "NotPositiveDefinite";
  constructor(readonly pivot: number) {
    super(`the matrix is not positive definite (pivot ${pivot + 1} is not above zero)`);
  }
}

/** Lower triangular L with A = LL', for a symmetric positive definite A. Throws NotPositiveDefinite. */
export function cholesky(a: Matrix): Matrix {
  const n = a.rows;
  const lower = matrix(n, n);
  const l = lower.data;
  for (let j = 0; j < n; j++) {
    let pivot = a.data[j * n + j]!;
    for (let m = 0; m < j; m++) pivot -= l[m * n + j]! ** 2;
    if (!(pivot > 0)) throw new NotPositiveDefinite(j);
    const root = Math.sqrt(pivot);
    l[j * n + j] = root;
    for (let i = j + 1; i < n; i++) {
      let value = a.data[j * n + i]!;
      for (let m = 0; m < j; m++) value -= l[m * n + i]! * l[m * n + j]!;
      l[j * n + i] = value / root;
    }
  }
  return lower;
}

/** Solves LL'Z = B for a lower triangular L: every column of B in turn. */
export function solveCholesky(lower: Matrix, b: Matrix): Matrix {
  const n = lower.rows;
  const l = lower.data;
  const result = matrix(n, b.columns, Float64Array.from(b.data));
  for (let column = 0; column < b.columns; column++) {
    const z = result.data.subarray(column * n, (column + 1) * n);
    for (let i = 0; i < n; i++) {
      z[i] = z[i]! / l[i * n + i]!;
      for (let m = i + 1; m < n; m++) z[m]! -= l[i * n + m]! * z[i]!;
    }
    for (let i = n - 1; i >= 0; i--) {
      for (let m = i + 1; m < n; m++) z[i]! -= l[i * n + m]! * z[m]!;
      z[i] = z[i]! / l[i * n + i]!;
    }
  }
  return result;
}
