import type { Regression } from "../../estimate/index.js";
import { columnOf } from "../../numeric/index.js";
import { missingPeriods } from "../parts/time.js";
import { autocorrelations, partialAutocorrelations } from "./correlogram.js";

/** How far dependence alone moves the variance of each coefficient. */
export interface Inflation {
  /** Order of the autoregression fitted to the residuals. */
  readonly order: number;
  readonly autoregression: Float64Array;
  /**
   * For each term, the variance under that autoregression over the variance under independence, both per σ². Empty with
   * lagged outcomes among the terms: dependent errors then bias the coefficients themselves.
   */
  readonly factors: readonly { readonly term: string; readonly factor: number }[];
}

/**
 * For each coefficient c'β̂ with influence w = XGc, w'Ωw / w'w, where Ω is the correlation matrix of an
 * autoregression fitted to the residuals (Yule–Walker, order up to `highest` by AIC). With an AR(1) regressor λ and AR(1)
 * errors ρ this is (1+ρλ)/(1−ρλ) in large samples. Residual autocorrelations lean towards zero, so it errs low.
 */
export function varianceInflation(
  m: Regression,
  residuals: Float64Array,
  highest = Math.floor(10 * Math.log10(m.T)),
): Inflation {
  const lags = Math.max(0, Math.min(highest, Math.floor(m.T / 4)));
  const { r } = autocorrelations(residuals, m.periods, lags);
  const { innovation, coefficients } = partialAutocorrelations(r);
  let order = 0;
  let best = 0;
  for (let p = 1; p < coefficients.length; p++) {
    const criterion = m.T * Math.log(innovation[p]!) + 2 * p;
    if (criterion < best) {
      best = criterion;
      order = p;
    }
  }
  const phi = coefficients[order]!;
  if (m.laggedOutcome) return { order, autoregression: phi, factors: [] };
  const factors = m.terms.map((term, j) => {
    const w = influence(m, j);
    return { term, factor: filteredSquare(w, m.periods, phi) * innovation[order]! };
  });
  return { order, autoregression: phi, factors };
}

/** XG e_j scaled to unit length. */
function influence(m: Regression, j: number): Float64Array {
  const w = new Float64Array(m.T);
  for (let i = 0; i < m.k; i++) {
    const g = m.gramInverse.data[j * m.k + i]!;
    const x = columnOf(m.X, i);
    for (let t = 0; t < m.T; t++) w[t]! += g * x[t]!;
  }
  const length = Math.sqrt(w.reduce((sum, x) => sum + x * x, 0));
  return w.map((x) => x / length);
}

/**
 * w'Ωw in units of the innovation variance: the squared length of w run backwards in time through the
 * autoregression, on past the first period until it has died out (u = Ψε gives w'E[uu']w = ‖Ψ'w‖²).
 */
function filteredSquare(w: Float64Array, periods: Float64Array, phi: Float64Array): number {
  const p = phi.length;
  if (p === 0) return 1;
  const span = w.length + missingPeriods(periods);
  const first = periods[0]!;
  const state = new Float64Array(p);
  let newest = 0;
  let sum = 0;
  let row = w.length - 1;
  const negligible = 1e-9 / Math.sqrt(span);
  for (let slot = span - 1; slot > -1e7; slot--) {
    const present = row >= 0 && periods[row]! - first === slot;
    let v = present ? w[row]! : 0;
    if (present) row--;
    for (let i = 0; i < p; i++) v += phi[i]! * state[(newest + i) % p]!;
    newest = (newest + p - 1) % p;
    state[newest] = v;
    sum += v * v;
    if (!present && state.every((x) => Math.abs(x) < negligible)) {
      if (row < 0) break;
      state.fill(0);
      slot = periods[row]! - first + 1;
    }
  }
  return sum;
}
