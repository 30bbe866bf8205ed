import type { Matrix } from "../numeric/index.js";

/**
 * A linear regression as a covariance estimator or a test sees it: the numbers that were regressed (whitened
 * ones when the errors are modelled) and what came out. T rows, k columns.
 */
export interface Regression {
  /** T×k, the intercept included. */
  readonly X: Matrix;
  readonly y: Float64Array;
  /** The k coefficients, in the order of `terms`. */
  readonly coefficients: Float64Array;
  /** y − Xβ̂, length T. */
  readonly residuals: Float64Array;
  /** (X'X)⁻¹, k×k. */
  readonly gramInverse: Matrix;
  /** An orthonormal basis of the columns of X, T×k, formed at first use. */
  readonly Q: Matrix;
  /** Diagonal of X(X'X)⁻¹X', length T, formed at first use. */
  readonly leverage: Float64Array;
  /** Residual sum of squares. */
  readonly rss: number;
  readonly T: number;
  readonly k: number;
  /** Labels of the columns of X. */
  readonly terms: readonly string[];
  /** Position of the intercept among the columns, −1 when there is none. */
  readonly interceptAt: number;
  /**
   * Where each row stands on the time axis, in whole steps, strictly increasing. Neighbouring rows differ by one
   * except across missing periods. Lagged products are taken in time: pairs across a gap are not neighbours.
   */
  readonly periods: Float64Array;
  /** Whether a lag of the outcome is among the terms, in which case some tests do not apply. */
  readonly laggedOutcome: boolean;
  /** What row `row` (from 0) is called on a card: `2022-W14`. Absent when the rows come from no table. */
  readonly periodName?: (row: number) => string;
}
