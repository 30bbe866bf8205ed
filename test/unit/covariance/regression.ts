import type { Regression } from "../../../src/estimate/index.js";
import {
  columnOf,
  counterRandom,
  fromColumns,
  type Matrix,
  orthonormalBasis,
  solveLeastSquares,
} from "../../../src/numeric/index.js";

export interface RegressionOptions {
  readonly terms?: readonly string[];
  /** Place of the intercept; 0 unless said. */
  readonly interceptAt?: number;
  readonly periods?: ArrayLike<number>;
}

/** A least-squares regression of y on the given columns, as the estimate room would hand it over. */
export function regressionOf(
  columns: readonly ArrayLike<number>[],
  y: ArrayLike<number>,
  options: RegressionOptions = {},
): Regression {
  const X = fromColumns(columns);
  const outcome = Float64Array.from(y);
  const solved = solveLeastSquares(X, outcome);
  const { rows: T, columns: k } = X;
  const Q = orthonormalBasis(X);
  const leverage = new Float64Array(T);
  for (let j = 0; j < k; j++) {
    columnOf(Q, j).forEach((q, t) => {
      leverage[t]! += q * q;
    });
  }
  return {
    X,
    y: outcome,
    coefficients: solved.coefficients,
    residuals: solved.residuals,
    gramInverse: solved.gramInverse,
    Q,
    leverage,
    rss: solved.rss,
    T,
    k,
    terms: options.terms ?? Array.from({ length: k }, (_, j) => (j === 0 ? "intercept" : `x${j}`)),
    interceptAt: options.interceptAt ?? 0,
    periods: Float64Array.from(options.periods ?? Array.from({ length: T }, (_, t) => t)),
    laggedOutcome: false,
  };
}

/** √ of the diagonal. */
export function standardErrors(V: Matrix): number[] {
  return Array.from({ length: V.rows }, (_, a) => Math.sqrt(V.data[a * V.rows + a]!));
}

/** The a-th unit vector of length k. */
export function unit(k: number, a: number): Float64Array {
  const result = new Float64Array(k);
  result[a] = 1;
  return result;
}

/** A series with first-order coefficient ρ and unit innovations. */
export function autoregressive(T: number, rho: number, seed: number): Float64Array {
  const random = counterRandom(seed, 0);
  const series = new Float64Array(T);
  let value = random.normal() / Math.sqrt(Math.max(1e-3, 1 - rho * rho));
  for (let t = 0; t < T; t++) {
    series[t] = value;
    value = rho * value + random.normal();
  }
  return series;
}

/** An invented regression: an intercept and k − 1 regressors, errors and regressors with memory. */
export function invented(T: number, k: number, seed: number, rho = 0.5): Regression {
  const columns: Float64Array[] = [new Float64Array(T).fill(1)];
  for (let j = 1; j < k; j++) columns.push(autoregressive(T, rho, 1000 * seed + j));
  const errors = autoregressive(T, rho, 1000 * seed);
  const y = errors.map((u, t) => u + 1 + 0.5 * (columns[1]?.[t] ?? 0));
  return regressionOf(columns, y);
}
