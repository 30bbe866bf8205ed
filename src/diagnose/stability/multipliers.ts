import { counterRandom } from "../../numeric/index.js";

/**
 * Standard normal multipliers with triangular autocorrelation up to `reach` − 1 rows (Shao 2010): moving sums of `reach`
 * independent normals over √reach, of replicate `draw` under `seed`. Written into `target`.
 */
export function dependentMultipliers(
  seed: number,
  draw: number,
  reach: number,
  target: Float64Array,
): Float64Array {
  const T = target.length;
  if (reach <= 1) return counterRandom(seed, draw).fillNormal(target);
  const z = counterRandom(seed, draw).fillNormal(new Float64Array(T + reach - 1));
  const scale = 1 / Math.sqrt(reach);
  let sum = 0;
  for (let t = 0; t < reach - 1; t++) sum += z[t]!;
  for (let t = 0; t < T; t++) {
    sum += z[t + reach - 1]!;
    target[t] = sum * scale;
    sum -= z[t]!;
  }
  return target;
}

/** Bartlett bandwidth by Andrews' (1991) AR(1) plug-in on a residual autocorrelation, at least 1, at most T/4, whole. */
export function dependenceReach(rho: number, T: number): number {
  const r = Math.max(-0.97, Math.min(0.97, rho));
  const alpha = (4 * r * r) / ((1 - r) ** 2 * (1 + r) ** 2);
  const width = 1.1447142425533319 * (alpha * T) ** (1 / 3);
  return Math.max(1, Math.min(Math.floor(T / 4), Math.round(width)));
}
