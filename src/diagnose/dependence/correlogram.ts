import { laggedProducts, missingPeriods } from "../parts/time.js";

/** Autocorrelations at lags 1 .. n, of values about zero. */
export interface Correlations {
  /** rⱼ at index j−1. */
  readonly r: Float64Array;
  /** Pairs of rows that stand j periods apart. */
  readonly pairs: Int32Array;
  /** Periods from the first row to the last, both counted. */
  readonly span: number;
  readonly T: number;
}

/**
 * Sample autocorrelations of `values` (taken about zero: subtract a mean beforehand if wanted) at lags 1 .. `lags`.
 * Without gaps rⱼ = Σ e(t)e(t−j) / Σ e(t)². With gaps the mean product over the pairs present stands in for the
 * sum: rⱼ = (1 − j/span)·(Σ over pairs / pairs) / (Σ e²/T). NaN at a lag with no pair.
 */
export function autocorrelations(values: Float64Array, periods: Float64Array, lags: number): Correlations {
  const T = values.length;
  const span = T + missingPeriods(periods);
  const r = new Float64Array(lags);
  const counts = new Int32Array(lags);
  const total = laggedProducts(values, values, periods, 0).sum;
  for (let lag = 1; lag <= lags; lag++) {
    const { sum, pairs } = laggedProducts(values, values, periods, lag);
    counts[lag - 1] = pairs;
    r[lag - 1] = pairs === 0 ? Number.NaN : (sum / total) * (T / span) * ((span - lag) / pairs);
  }
  return { r, pairs: counts, span, T };
}

/**
 * Partial autocorrelations from autocorrelations at lags 1 .. n (Durbin–Levinson recursion), and what the
 * recursion knows beside them. From the first lag at which the autocorrelations are not those of any stationary
 * process (possible across gaps, or NaN) the rest are NaN.
 */
export function partialAutocorrelations(r: Float64Array): {
  values: Float64Array;
  /** Innovation variance over the variance after each order, from order 0. */
  innovation: Float64Array;
  /** Coefficients φ₁ .. φₙ of the autoregression of each order, from order 0. */
  coefficients: Float64Array[];
} {
  const n = r.length;
  const values = new Float64Array(n).fill(Number.NaN);
  const innovation = new Float64Array(n + 1).fill(Number.NaN);
  innovation[0] = 1;
  const coefficients = [new Float64Array(0)];
  for (let order = 1; order <= n; order++) {
    const phi = coefficients[order - 1]!;
    let unexplained = r[order - 1]!;
    for (let i = 0; i < order - 1; i++) unexplained -= phi[i]! * r[order - 2 - i]!;
    const partial = unexplained / innovation[order - 1]!;
    if (!(Math.abs(partial) < 1)) break;
    const next = new Float64Array(order);
    for (let i = 0; i < order - 1; i++) next[i] = phi[i]! - partial * phi[order - 2 - i]!;
    next[order - 1] = partial;
    coefficients.push(next);
    values[order - 1] = partial;
    innovation[order] = innovation[order - 1]! * (1 - partial * partial);
  }
  return { values, innovation, coefficients };
}
