import { InputError } from "../../numeric/index.js";
import type { Kernel } from "../kernels.js";
import type { RawScores } from "./raw-scores.js";

export interface NeweyWest1994Choice {
  readonly bandwidth: number;
  /** The pre-truncation lag n. */
  readonly preTruncation: number;
  readonly s0: number;
  readonly sq: number;
  readonly gamma: number;
}

/** n = ⌊4 (T/100)^p⌋; exponents from memory of the paper, agreeing with the project's reference figures. */
const exponents: Partial<Record<Kernel["name"], number>> = {
  bartlett: 2 / 9,
  parzen: 4 / 25,
  "quadratic spectral": 2 / 25,
};

export const hasNeweyWest1994 = (kernel: Kernel): boolean => kernel.name in exponents;

/**
 * The nonparametric plug-in of Newey and West (1994, Review of Economic Studies 61) on the sum of the weighted scores:
 * γ = c ((s_q/s_0)²)^(1/(2q+1)). Bartlett and Parzen take L = ⌊γ T^(1/(2q+1))⌋ lags, which is bandwidth L + 1; the quadratic
 * spectral kernel takes γ T^(1/5) as it is.
 * @throws InputError where s_0 vanishes.
 */
export function neweyWest1994Bandwidth(kernel: Kernel, scores: RawScores): NeweyWest1994Choice {
  const exponent = exponents[kernel.name]!;
  const q = kernel.order!;
  const { T } = scores;
  const preTruncation = Math.min(T - 1, Math.floor(4 * (T / 100) ** exponent));
  const sum = weightedSum(scores);
  const variance = covariance(sum, 0, T);
  let s0 = variance;
  let sq = 0;
  for (let j = 1; j <= preTruncation; j++) {
    const sigma = covariance(sum, j, T);
    s0 += 2 * sigma;
    sq += 2 * j ** q * sigma;
  }
  if (!(Math.abs(s0) > 1e-8 * variance)) {
    throw new InputError(
      `hac: the Newey–West (1994) rule divides by the long-run variance of the scores, and over ` +
        `${preTruncation} lags that comes out as nothing. Give a bandwidth, or bandwidth: "andrews".`,
    );
  }
  const gamma = kernel.constant * ((sq / s0) ** 2) ** (1 / (2 * q + 1));
  const real = gamma * T ** (1 / (2 * q + 1));
  const bandwidth = kernel.finite ? Math.min(T - 1, Math.floor(real)) + 1 : Math.min(T, real);
  return { bandwidth, preTruncation, s0, sq, gamma };
}

function weightedSum(scores: RawScores): Float64Array {
  let sum: Float64Array | undefined;
  for (let a = 0; a < scores.terms.length; a++) {
    if (!scores.weighted[a]) continue;
    const column = scores.column(a);
    if (!sum) sum = Float64Array.from(column);
    else for (let t = 0; t < column.length; t++) sum[t]! += column[t]!;
  }
  return sum!;
}

function covariance(series: Float64Array, lag: number, T: number): number {
  let sum = 0;
  for (let t = lag; t < series.length; t++) sum += series[t]! * series[t - lag]!;
  return sum / T;
}
