import { singularValues } from "./eigen.js";
import { InputError } from "./failure.js";
import { gramInverse } from "./gram-inverse.js";
import { columnOf, type Matrix, matrix } from "./matrix.js";
import { dot } from "./products.js";
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
  /** (X'X)⁻¹, k×k: all digits up to a condition of 1e8, beyond it 32 less twice the digits of the condition. */
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
 * columns, then iterative refinement with residuals in doubled precision (after Björck 1967), which makes the coefficients right to about the last bit. Throws
 * RankDeficient, naming the dependent columns, and InputError at a row that holds no finite number.
 */
export function solveLeastSquares(X: Matrix, y: Float64Array): LeastSquares {
  const { rows: T, columns: k } = X;
  if (k === 0) throw new InputError("least squares: there is no column to fit the outcome on.");
  if (y.length !== T) throw new InputError(`least squares: ${T} rows of terms, ${y.length} of the outcome.`);
  const {
    columns: [...columns],
    before,
    r: triangle,
    scales,
  } = scaledTriangle([...Array.from({ length: k }, (_, j) => columnOf(X, j)), y], (j) =>
    j < k ? `column ${j + 1}` : "the outcome",
  );
  const outcome = columns.pop()!;
  const scaledR = matrix(k, k);
  for (let j = 0; j < k; j++) scaledR.data.set(triangle.data.subarray(j * (k + 1), j * (k + 1) + k), j * k);
  const whole = scales.map((scale, j) => scale * before[j]!);
  checkRank(scaledR, T, whole);

  const start = solveUpper(scaledR, triangle.data.subarray(k * (k + 1)), k);
  for (let j = 0; j < k; j++) start[j] = (start[j]! * scales[j]!) / scales[k]!;
  const scaledCondition = condition(scaledR);
  const refined = refine(columns, outcome, scaledR, scales, start, scaledCondition);
  const coefficients = refined.coefficients.map((value, j) => value * (before[j]! / before[k]!));
  const residuals =
    before[k] === 1 ? refined.residuals : refined.residuals.map((value) => value / before[k]!);

  const inverse = gramInverse(columns, scaledR, scales, scaledCondition);
  const R = matrix(k, k);
  for (let j = 0; j < k; j++) {
    for (let i = 0; i < k; i++) inverse.data[j * k + i]! *= whole[i]! * whole[j]!;
    for (let i = 0; i <= j; i++) R.data[j * k + i] = scaledR.data[j * k + i]! / whole[j]!;
  }
  return {
    coefficients,
    residuals,
    gramInverse: inverse,
    R,
    rss: dot(residuals, residuals),
    condition: scaledCondition,
  };
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
