import { columnOf, type Matrix, matrix } from "./matrix.js";
import { dot } from "./products.js";
import { scaledTriangle } from "./tall-qr.js";

/**
 * Orthonormal basis (T×k) of the k independent columns of X (T×k): Q = X R⁻¹, then once more, which brings the
 * columns back to orthonormal to rounding (Yamamoto et al. 2015).
 */
export function orthonormalBasis(X: Matrix): Matrix {
  let q = divideByTriangle(X);
  q = divideByTriangle(q);
  return q;
}

function divideByTriangle(X: Matrix): Matrix {
  const { rows: T, columns: k } = X;
  const { r, scales, columns } = scaledTriangle(Array.from({ length: k }, (_, j) => columnOf(X, j)));
  const result = matrix(T, k);
  for (let j = 0; j < k; j++) {
    const target = columnOf(result, j);
    for (let t = 0; t < T; t++) target[t] = columns[j]![t]! * scales[j]!;
    for (let i = 0; i < j; i++) {
      const weight = r.data[j * k + i]!;
      const source = columnOf(result, i);
      for (let t = 0; t < T; t++) target[t]! -= weight * source[t]!;
    }
    const pivot = r.data[j * k + j]!;
    for (let t = 0; t < T; t++) target[t]! /= pivot;
  }
  return result;
}

/** x minus its projection on the orthonormal columns of Q: the residuals of x, length T. */
export function projectOut(Q: Matrix, x: Float64Array): Float64Array {
  const result = Float64Array.from(x);
  for (let j = 0; j < Q.columns; j++) {
    const column = columnOf(Q, j);
    const weight = dot(column, result);
    for (let t = 0; t < result.length; t++) result[t]! -= weight * column[t]!;
  }
  return result;
}
