import { fft } from "./fft.js";
import { columnOf, type Matrix, matrix } from "./matrix.js";

const refreshEvery = 1024;

/**
 * Σ_t v_t v_t' of the scores v_t = x_t û_t, k×k. X is T×k; the scores are formed on the way, never stored.
 */
export function scoreGram(X: Matrix, residuals: Float64Array): Matrix {
  const { rows: T, columns: k } = X;
  const result = matrix(k, k);
  for (let a = 0; a < k; a++) {
    const xa = columnOf(X, a);
    for (let b = a; b < k; b++) {
      const xb = columnOf(X, b);
      let sum = 0;
      for (let t = 0; t < T; t++) sum += xa[t]! * xb[t]! * residuals[t]! * residuals[t]!;
      result.data[b * k + a] = sum;
      result.data[a * k + b] = sum;
    }
  }
  return result;
}

/**
 * The Bartlett-weighted sum Γ_0 + Σ_j (1 − j/(L+1)) (Γ_j + Γ_j') of the scores v_t = x_t û_t (sums, not divided by
 * T) with L = `lags`, in one pass whatever L: (L+1)⁻¹ Σ_s W_s W_s' over all windows of L + 1 neighbouring scores.
 * `periods` places the rows in time; a missing period counts as a zero score (Parzen 1963). The running sums start
 * afresh every 1,024 steps against drift. O(span·k²).
 */
export function scoreMovingSums(
  X: Matrix,
  residuals: Float64Array,
  periods: ArrayLike<number>,
  lags: number,
): Matrix {
  const { rows: T, columns: k } = X;
  const result = matrix(k, k);
  const columns = Array.from({ length: k }, (_, j) => columnOf(X, j));
  const window = new Float64Array(k);
  const sums = new Float64Array(k * k);
  const first = periods[0]!;
  const last = periods[T - 1]!;
  let entering = 0; // next row to come in
  let leaving = 0; // next row to go out
  let sinceRefresh = 0;
  for (let s = first; s <= last + lags; s++) {
    let moved = false;
    if (entering < T && periods[entering] === s) {
      const u = residuals[entering]!;
      for (let j = 0; j < k; j++) window[j]! += columns[j]![entering]! * u;
      entering++;
      moved = true;
    }
    if (leaving < entering && periods[leaving]! < s - lags) {
      const u = residuals[leaving]!;
      for (let j = 0; j < k; j++) window[j]! -= columns[j]![leaving]! * u;
      leaving++;
      moved = true;
    }
    if (moved && ++sinceRefresh >= refreshEvery) {
      sinceRefresh = 0;
      window.fill(0);
      for (let row = leaving; row < entering; row++) {
        for (let j = 0; j < k; j++) window[j]! += columns[j]![row]! * residuals[row]!;
      }
    }
    for (let b = 0; b < k; b++) {
      const weight = window[b]!;
      for (let a = 0; a <= b; a++) sums[b * k + a]! += window[a]! * weight;
    }
  }
  for (let b = 0; b < k; b++) {
    for (let a = 0; a <= b; a++) {
      const value = sums[b * k + a]! / (lags + 1);
      result.data[b * k + a] = value;
      result.data[a * k + b] = value;
    }
  }
  return result;
}

/**
 * Σ_j w_j (Γ_j + Γ_j') + w_0 Γ_0 of the scores v_t = x_t û_t with Γ_j = Σ v_t v_{t−j}' in time (`periods`), for
 * weights w_0..w_L, by direct lagged products or by Fourier transform, whichever costs less.
 */
export function scoreLaggedProducts(
  X: Matrix,
  residuals: Float64Array,
  periods: ArrayLike<number>,
  weights: Float64Array,
): Matrix {
  const { rows: T, columns: k } = X;
  const first = periods[0]!;
  const span = periods[T - 1]! - first + 1;
  const lags = Math.min(weights.length - 1, span - 1);
  const scores = Array.from({ length: k }, (_, j) => {
    const series = new Float64Array(span);
    const column = columnOf(X, j);
    for (let t = 0; t < T; t++) series[periods[t]! - first] = column[t]! * residuals[t]!;
    return series;
  });
  let size = 1;
  while (size < span + lags) size *= 2;
  const filtered =
    lags * span > 24 * size * Math.log2(Math.max(2, size))
      ? scores.map((series) => smoothByFourier(series, weights, lags, size))
      : scores.map((series) => smoothDirectly(series, weights, lags));
  const result = matrix(k, k);
  for (let a = 0; a < k; a++) {
    for (let b = a; b < k; b++) {
      const value = (inner(scores[a]!, filtered[b]!) + inner(scores[b]!, filtered[a]!)) / 2;
      result.data[b * k + a] = value;
      result.data[a * k + b] = value;
    }
  }
  return result;
}

function inner(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
}

/** w_0 v_t + Σ_j w_j (v_{t−j} + v_{t+j}). */
function smoothDirectly(series: Float64Array, weights: Float64Array, lags: number): Float64Array {
  const n = series.length;
  const result = series.map((value) => value * weights[0]!);
  for (let j = 1; j <= lags; j++) {
    const weight = weights[j]!;
    if (weight === 0) continue;
    for (let t = j; t < n; t++) {
      result[t]! += weight * series[t - j]!;
      result[t - j]! += weight * series[t]!;
    }
  }
  return result;
}

function smoothByFourier(
  series: Float64Array,
  weights: Float64Array,
  lags: number,
  size: number,
): Float64Array {
  const re = new Float64Array(size);
  const im = new Float64Array(size);
  re.set(series);
  fft(re, im);
  const wr = new Float64Array(size);
  const wi = new Float64Array(size);
  wr[0] = weights[0]!;
  for (let j = 1; j <= lags; j++) {
    wr[j]! += weights[j]!;
    wr[size - j]! += weights[j]!;
  }
  fft(wr, wi);
  // The weights are even, so their transform is real. Inverse by swapping the parts.
  for (let i = 0; i < size; i++) {
    re[i] = re[i]! * wr[i]!;
    im[i] = im[i]! * wr[i]!;
  }
  fft(im, re);
  return re.slice(0, series.length).map((value) => value / size);
}
