import { singularValues } from "./eigen.js";
import { columnOf, type Matrix, matrix } from "./matrix.js";
import { checkRank } from "./rank.js";
import { refine } from "./refinement.js";
import { norm, solveUpper } from "./scaling.js";
import { scaledTriangle } from "./tall-qr.js";

/** What `solveLeastSquares` returns. */
export interface LeastSquares {
  /** Minimisers of ‖y − Xβ‖, length k. */
  readonly coefficients: Float64Array;
  /** y − Xβ̂, length T. */
  readonly residuals: Float64Array;
  /** (X'X)⁻¹, k×k, from the triangle, never from X'X. */
  readonly gramInverse: Matrix;
  /** Upper triangular R with R'R = X'X. */
  readonly R: Matrix;
  /** Residual sum of squares. */
  readonly rss: number;
  /** 2-norm condition number of X with columns of unit length. */
  readonly condition: number;
}

/**
 * Least squares of y (length T) on the columns of X (T×k, T ≥ k): tall QR after power-of-two scaling of the
 * columns, then iterative refinement with residuals in doubled precision (after Björck 1967), which makes the coefficients right to about the last bit. Throws RankDeficient, naming the dependent columns.
 */
export function solveLeastSquares(X: Matrix, y: Float64Array): LeastSquares {
  const { rows: T, columns: k } = X;
  const columns = Array.from({ length: k }, (_, j) => columnOf(X, j));
  const { r: triangle, scales } = scaledTriangle([...columns, y]);
  const scaledR = matrix(k, k);
  for (let j = 0; j < k; j++) scaledR.data.set(triangle.data.subarray(j * (k + 1), j * (k + 1) + k), j * k);
  checkRank(scaledR, T, scales);

  const start = solveUpper(scaledR, triangle.data.subarray(k * (k + 1)), k);
  for (let j = 0; j < k; j++) start[j] = (start[j]! * scales[j]!) / scales[k]!;
  const scaledCondition = condition(scaledR);
  const { coefficients, residuals } = refine(columns, y, scaledR, scales, start, scaledCondition);

  const R = matrix(k, k);
  for (let j = 0; j < k; j++)
    for (let i = 0; i <= j; i++) R.data[j * k + i] = scaledR.data[j * k + i]! / scales[j]!;
  let rss = 0;
  for (let t = 0; t < T; t++) rss += residuals[t]! * residuals[t]!;
  return {
    coefficients,
    residuals,
    gramInverse: gramInverse(scaledR, scales),
    R,
    rss,
    condition: scaledCondition,
  };
}

function gramInverse(scaledR: Matrix, scales: Float64Array): Matrix {
  const k = scaledR.columns;
  const inverse = matrix(k, k);
  const unit = new Float64Array(k);
  for (let j = 0; j < k; j++) {
    unit.fill(0);
    unit[j] = 1;
    inverse.data.set(solveUpper(scaledR, unit), j * k);
  }
  const result = matrix(k, k);
  for (let i = 0; i < k; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = 0;
      for (let m = i; m < k; m++) sum += inverse.data[m * k + i]! * inverse.data[m * k + j]!;
      const value = sum * scales[i]! * scales[j]!;
      result.data[j * k + i] = value;
      result.data[i * k + j] = value;
    }
  }
  return result;
}

function condition(r: Matrix): number {
  const k = r.columns;
  const unit = matrix(k, k);
  for (let j = 0; j < k; j++) {
    const column = columnOf(r, j);
    const length = norm(column);
    for (let i = 0; i <= j; i++) unit.data[j * k + i] = column[i]! / length;
  }
  const values = singularValues(unit);
  return values[0]! / values[k - 1]!;
}
