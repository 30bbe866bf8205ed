import type { Kernel } from "../kernels.js";
import type { RawScores } from "./raw-scores.js";

/** Beyond this an AR(1) coefficient of a score is taken for this. */
export const CAP = 0.97;

/** What the plug-in rule found. */
export interface AndrewsChoice {
  readonly bandwidth: number;
  /** α(1) for Bartlett, α(2) for the others. */
  readonly alpha: number;
  /** AR(1) coefficient of each score before the cap; NaN for scores that carry no weight. */
  readonly rho: Float64Array;
  /** Terms whose coefficient was capped. */
  readonly capped: readonly string[];
}

/**
 * The AR(1) plug-in bandwidth of Andrews (1991, Econometrica 59, equations 6.2 and 6.4): S = c (α(q) T)^(1/(2q+1)), with ρ and
 * σ² of each score from its regression on its own past, no constant. Pairs across missing periods are left out.
 */
export function andrewsBandwidth(kernel: Kernel, scores: RawScores): AndrewsChoice {
  const q = kernel.order ?? 2;
  const k = scores.terms.length;
  const rho = new Float64Array(k).fill(Number.NaN);
  const variance = new Float64Array(k);
  const capped: string[] = [];
  for (let a = 0; a < k; a++) {
    if (!scores.weighted[a]) continue;
    const fitted = firstOrder(scores.column(a), scores.observed);
    rho[a] = fitted.rho;
    variance[a] = fitted.variance;
    if (Math.abs(fitted.rho) > CAP) capped.push(scores.terms[a]!);
  }
  const alpha = plugIn(q, rho, variance);
  const bandwidth = kernel.constant * (alpha * scores.T) ** (1 / (2 * q + 1));
  return { bandwidth, alpha, rho, capped };
}

function plugIn(q: 1 | 2, rho: Float64Array, variance: Float64Array): number {
  const largest = Math.max(...variance);
  if (!(largest > 0)) return 0;
  let numerator = 0;
  let denominator = 0;
  for (let a = 0; a < rho.length; a++) {
    if (!(variance[a]! > 0)) continue;
    const r = Math.max(-CAP, Math.min(CAP, rho[a]!));
    const weight = (variance[a]! / largest) ** 2;
    const shape = q === 1 ? (1 - r) ** 6 * (1 + r) ** 2 : (1 - r) ** 8;
    numerator += (weight * 4 * r * r) / shape;
    denominator += weight / (1 - r) ** 4;
  }
  return numerator / denominator;
}

/** ρ and the residual variance of a series on its own past, over neighbours in time. */
export function firstOrder(
  series: Float64Array,
  observed?: Uint8Array,
): { rho: number; variance: number; pairs: number } {
  let cross = 0;
  let past = 0;
  let now = 0;
  let pairs = 0;
  for (let t = 1; t < series.length; t++) {
    if (observed && !(observed[t] && observed[t - 1])) continue;
    const x = series[t - 1]!;
    const y = series[t]!;
    cross += y * x;
    past += x * x;
    now += y * y;
    pairs++;
  }
  if (!(past > 0) || pairs === 0) return { rho: 0, variance: pairs > 0 ? now / pairs : 0, pairs };
  const rho = cross / past;
  // Σ(y − ρx)² summed as such: the difference of sums would lose digits near ρ = ±1.
  let square = 0;
  for (let t = 1; t < series.length; t++) {
    if (observed && !(observed[t] && observed[t - 1])) continue;
    square += (series[t]! - rho * series[t - 1]!) ** 2;
  }
  return { rho, variance: square / pairs, pairs };
}
