import { fromColumns, InputError, solveLeastSquares } from "../../numeric/index.js";
import type { Test } from "../test.js";
import { type Deterministic, deterministicColumns } from "./deterministic.js";
import { unitRootLower } from "./unit-root-law.js";

/** Bartlett lags ⌊4(n/100)^¼⌋. */
export function shortLags(n: number): number {
  return Math.floor(4 * (n / 100) ** 0.25);
}

/** Autocovariance sums over n with Bartlett weights 1 − j/(lags+1): the long-run variance of `e`. */
export function longRunVariance(e: Float64Array, lags: number): { variance: number; longRun: number } {
  const n = e.length;
  const gamma = (j: number) => {
    let sum = 0;
    for (let t = j; t < n; t++) sum += e[t]! * e[t - j]!;
    return sum / n;
  };
  const variance = gamma(0);
  let longRun = variance;
  for (let j = 1; j <= lags; j++) longRun += 2 * (1 - j / (lags + 1)) * gamma(j);
  return { variance, longRun };
}

/**
 * Phillips and Perron (1988): y(t) on deterministic terms and y(t−1), the t ratio corrected for dependent errors,
 * Z_t = √(γ₀/λ²)·t − ½(λ²−γ₀)/λ·n·se/s, with λ² by Bartlett weights over `lags`; left tail, Dickey–Fuller law.
 */
export function phillipsPerron(
  y: Float64Array,
  deterministic: Deterministic,
  lags: number | undefined,
  what: string,
): Test {
  const n = y.length - 1;
  const mean = y.reduce((sum, v) => sum + v / y.length, 0);
  const level = deterministic === "none" ? y : y.map((v) => v - mean);
  const largest = level.reduce((most, v) => Math.max(most, Math.abs(v)), 0);
  if (!(largest > 0)) throw new InputError(`${what}: the series is constant.`);
  const scaled = level.map((v) => v / largest);
  const columns = [...deterministicColumns(deterministic, n), scaled.slice(0, n)];
  const k = columns.length;
  if (n <= k + 1)
    throw new InputError(`${what}: ${y.length} periods are too few for a Phillips–Perron test.`);
  const { coefficients, gramInverse, residuals, rss } = solveLeastSquares(
    fromColumns(columns),
    scaled.slice(1),
  );
  const s = Math.sqrt(rss / (n - k));
  const se = s * Math.sqrt(gramInverse.data[(k - 1) * k + k - 1]!);
  const l = lags ?? shortLags(n);
  const { variance, longRun } = longRunVariance(residuals, l);
  const lambda = Math.sqrt(longRun);
  const t = (coefficients[k - 1]! - 1) / se;
  const z = Math.sqrt(variance / longRun) * t - (((longRun - variance) / (2 * lambda)) * n * se) / s;
  return {
    name: "Phillips–Perron",
    lags: l,
    statistic: z,
    df: [],
    distribution: `Dickey–Fuller, ${deterministic}`,
    p: unitRootLower(z, n, deterministic),
    valid: true,
    note: `Bartlett weights over ${l} lags, ${n} periods`,
  };
}
