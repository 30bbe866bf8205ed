import { copyBlock } from "./copy-block.js";
import { columnOf, type Matrix, matrix } from "./matrix.js";
import { dot } from "./products.js";
import { scaledTriangle } from "./tall-qr.js";
import { padded, workspace } from "./wasm.js";

const blockRows = 512;

/**
 * Orthonormal basis (T×k) of the k independent columns of X (T×k): Q = X R⁻¹, then once more, which brings the
 * columns back to orthonormal to rounding (Yamamoto et al. 2015).
 */
export function orthonormalBasis(X: Matrix): Matrix {
  const q = matrix(X.rows, X.columns);
  divideInto(q, X);
  divideInto(q, q);
  return q;
}

/** Puts X R⁻¹ into `result`, which may be X. */
function divideInto(result: Matrix, X: Matrix): void {
  const { rows: T, columns: k } = X;
  const { r, scales, columns } = scaledTriangle(Array.from({ length: k }, (_, j) => columnOf(X, j)));
  const stride = padded(Math.min(T, blockRows));
  const { kernels, numbers, at } = workspace(k * stride, k * k);
  const [x, triangle] = at as [number, number];
  for (let j = 0; j < k; j++) {
    for (let i = 0; i < j; i++) numbers[triangle + j * k + i] = r.data[j * k + i]! / scales[j]!;
    numbers[triangle + j * k + j] = scales[j]! / r.data[j * k + j]!;
  }
  for (let start = 0; start < T; start += blockRows) {
    const rows = Math.min(blockRows, T - start);
    copyBlock(columns, start, rows, numbers, x, stride);
    kernels.divideByTriangle(8 * x, 8 * stride, k, padded(rows), 8 * triangle);
    for (let j = 0; j < k; j++) {
      const from = x + j * stride;
      result.data.set(numbers.subarray(from, from + rows), j * T + start);
    }
  }
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
