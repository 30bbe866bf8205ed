import { counterRandom } from "../../numeric/index.js";
import { autocorrelations, partialAutocorrelations } from "../dependence/correlogram.js";

/** Partial autocorrelations further out than this are drawn in: beyond, T is too short to tell them from one. */
const furthest = 0.98;

/** An autoregression for errors, from autocorrelations at lags 1 .. p (drawn in where they belong to no stationary process). */
export function autoregression(r: Float64Array): Float64Array {
  let phi = new Float64Array(0);
  const implied: number[] = [];
  let innovation = 1;
  for (let order = 1; order <= r.length; order++) {
    let rest = r[order - 1]!;
    for (let i = 0; i < order - 1; i++) rest -= phi[i]! * implied[order - 2 - i]!;
    const partial = Math.max(-furthest, Math.min(furthest, rest / innovation));
    const next = new Float64Array(order);
    for (let i = 0; i < order - 1; i++) next[i] = phi[i]! - partial * phi[order - 2 - i]!;
    next[order - 1] = partial;
    let value = partial * innovation;
    for (let i = 0; i < order - 1; i++) value += phi[i]! * implied[order - 2 - i]!;
    implied.push(value);
    innovation *= 1 - partial * partial;
    phi = next;
  }
  return phi;
}

/** Order of the autoregression of residuals by AIC, up to `highest`. */
export function orderByAic(residuals: Float64Array, periods: Float64Array, highest: number): number {
  const { r } = autocorrelations(residuals, periods, highest);
  const { innovation } = partialAutocorrelations(r);
  let best = 0;
  let least = 0;
  for (let p = 1; p <= highest; p++) {
    const criterion = residuals.length * Math.log(innovation[p]!) + 2 * p;
    if (criterion < least) {
      least = criterion;
      best = p;
    }
  }
  return best;
}

/**
 * Errors of an autoregression over T rows, run in over 100 rows: innovation t is a standard normal of replicate `draw` under `seed`
 * times `scale[t]` (one where no scale is given). Written into `target`.
 */
export function drawErrors(
  phi: Float64Array,
  seed: number,
  draw: number,
  target: Float64Array,
  scale?: Float64Array,
): Float64Array {
  const T = target.length;
  const p = phi.length;
  const random = counterRandom(seed, draw);
  if (p === 0) {
    random.fillNormal(target);
    if (scale) for (let t = 0; t < T; t++) target[t]! *= scale[t]!;
    return target;
  }
  const before = 100;
  const u = random.fillNormal(new Float64Array(before + T));
  for (let t = 0; t < u.length; t++) {
    if (scale) u[t]! *= scale[t < before ? (before - 1 - t) % T : t - before]!;
    for (let i = 1; i <= p && i <= t; i++) u[t]! += phi[i - 1]! * u[t - i]!;
  }
  target.set(u.subarray(before));
  return target;
}

/** What an autoregression leaves of residuals: e(t) − Σ φᵢe(t−i), earlier rows taken as zero. */
export function innovationsOf(residuals: Float64Array, phi: Float64Array): Float64Array {
  return residuals.map((e, t) => {
    let v = e;
    for (let i = 1; i <= phi.length && i <= t; i++) v -= phi[i - 1]! * residuals[t - i]!;
    return v;
  });
}
