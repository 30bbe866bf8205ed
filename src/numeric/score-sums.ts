import { laggedProducts } from "./lagged-products.js";
import { columnOf, type Matrix } from "./matrix.js";
import { movingSumProducts } from "./moving-sums.js";
import type { RowSeries } from "./series-block.js";

/** Σ_t v_t v_t' of the scores v_t = x_t û_t, k×k. X is T×k; the scores are formed on the way, never stored. */
export function scoreGram(X: Matrix, residuals: Float64Array): Matrix {
  return laggedProducts({ columns: columnsOf(X), multiplier: residuals }, Float64Array.of(1));
}

/**
 * The Bartlett-weighted sum Γ_0 + Σ_j (1 − j/(L+1)) (Γ_j + Γ_j') of the scores v_t = x_t û_t (sums, not divided by
 * T) with L = `lags`, in one pass whatever L. `periods` places the rows in time; a missing period counts as a zero
 * score (Parzen 1963).
 */
export function scoreMovingSums(
  X: Matrix,
  residuals: Float64Array,
  periods: ArrayLike<number>,
  lags: number,
): Matrix {
  return movingSumProducts(inTime(X, residuals, periods), lags + 1);
}

/** Σ_j w_j (Γ_j + Γ_j') + w_0 Γ_0 of the scores v_t = x_t û_t with Γ_j = Σ v_t v_{t−j}' in time, for weights w_0..w_L. */
export function scoreLaggedProducts(
  X: Matrix,
  residuals: Float64Array,
  periods: ArrayLike<number>,
  weights: Float64Array,
): Matrix {
  return laggedProducts(inTime(X, residuals, periods), weights);
}

const columnsOf = (X: Matrix): Float64Array[] => Array.from({ length: X.columns }, (_, j) => columnOf(X, j));

/** The scores on a calendar without holes. */
function inTime(X: Matrix, residuals: Float64Array, periods: ArrayLike<number>): RowSeries {
  const first = periods[0]!;
  const span = periods[X.rows - 1]! - first + 1;
  if (span === X.rows) return { columns: columnsOf(X), multiplier: residuals };
  const spread = (values: Float64Array): Float64Array => {
    const series = new Float64Array(span);
    for (let t = 0; t < values.length; t++) series[periods[t]! - first] = values[t]!;
    return series;
  };
  return { columns: columnsOf(X).map(spread), multiplier: spread(residuals) };
}
