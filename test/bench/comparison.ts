import { covariances, defaultEstimator } from "../../src/covariance/index.js";
import type { Covariance, Regression } from "../../src/estimate/index.js";
import { type Matrix, orthonormalBasis, solveLeastSquares } from "../../src/numeric/index.js";
import { regressionData } from "./data.js";
import { duration, type Table } from "./table.js";
import { median, seconds } from "./timing.js";

/** Every coefficient under all estimators of the default comparison, from a fit that no estimator has seen yet. */
export async function benchComparison(): Promise<Table> {
  const rows: string[][] = [];
  for (const [T, k, runs] of [
    [200, 6, 9],
    [1_000_000, 10, 3],
  ] as const) {
    const { X, y } = regressionData(T, k);
    const times: number[] = [];
    let count = 0;
    for (let run = 0; run <= runs; run++) {
      const m = fitted(X, y);
      const time = await seconds(() => (count = covariances(m).estimators.length));
      if (run > 0) times.push(time);
    }
    rows.push([`T = ${T}, k = ${k}`, String(count), duration(median(times))]);
  }
  return { title: "Default comparison of covariance estimators", heads: ["", "estimators", "Lagbook"], rows };
}

function fitted(X: Matrix, y: Float64Array) {
  const { coefficients, residuals, gramInverse, rss } = solveLeastSquares(X, y);
  let Q: Matrix | undefined;
  let leverage: Float64Array | undefined;
  const regression: Regression = {
    X,
    y,
    coefficients,
    residuals,
    gramInverse,
    rss,
    T: X.rows,
    k: X.columns,
    terms: Array.from({ length: X.columns }, (_, j) => (j === 0 ? "intercept" : `x${j}`)),
    interceptAt: 0,
    periods: Float64Array.from(y, (_, t) => t),
    laggedOutcome: false,
    get Q() {
      Q ??= orthonormalBasis(X);
      return Q;
    },
    get leverage() {
      leverage ??= rowLengths(this.Q);
      return leverage;
    },
  };
  const estimator = defaultEstimator();
  let covariance: Covariance | undefined;
  return {
    regression,
    outcome: "y",
    level: 0.95,
    estimator,
    get covariance() {
      covariance ??= estimator.on(regression);
      return covariance;
    },
  };
}

function rowLengths({ rows, columns, data }: Matrix): Float64Array {
  const result = new Float64Array(rows);
  for (let j = 0; j < columns; j++) for (let t = 0; t < rows; t++) result[t]! += data[j * rows + t]! ** 2;
  return result;
}
