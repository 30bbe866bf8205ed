import type { Regression } from "../../estimate/index.js";
import { fromColumns, type Matrix, orthonormalBasis, solveLeastSquares } from "../../numeric/index.js";

/**
 * A regression made inside a diagnostic: `y` on `columns`, labelled, standing at `periods`. Throws RankDeficient when
 * the columns depend on one another.
 */
export function auxiliaryRegression(
  y: Float64Array,
  columns: readonly Float64Array[],
  labels: readonly string[],
  periods: Float64Array,
  more: { interceptAt?: number; laggedOutcome?: boolean } = {},
): Regression {
  const X = fromColumns(columns);
  const { coefficients, residuals, gramInverse, rss } = solveLeastSquares(X, y);
  let Q: Matrix | undefined;
  let leverage: Float64Array | undefined;
  return {
    X,
    y,
    coefficients,
    residuals,
    gramInverse,
    get Q() {
      Q ??= orthonormalBasis(X);
      return Q;
    },
    get leverage() {
      leverage ??= rowSquares(this.Q);
      return leverage;
    },
    rss,
    T: X.rows,
    k: X.columns,
    terms: labels,
    interceptAt: more.interceptAt ?? -1,
    periods,
    laggedOutcome: more.laggedOutcome ?? false,
  };
}

function rowSquares(Q: Matrix): Float64Array {
  const squares = new Float64Array(Q.rows);
  for (let j = 0; j < Q.columns; j++)
    for (let t = 0; t < Q.rows; t++) squares[t]! += Q.data[j * Q.rows + t]! ** 2;
  return squares;
}
