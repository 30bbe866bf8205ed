import { type Kernel, lagWeights, lastLag } from "../kernels.js";

/** Lags of kernels that do not end, in bandwidths. */
const REACH = 6;

/** Σλ³ Σλ / (Σλ²)² and Σλ⁴ (Σλ)² / (Σλ²)³. */
export interface MomentRatios {
  readonly third: number;
  readonly fourth: number;
}

/**
 * Ratios of the eigenvalues' power sums for a bandwidth that is short beside the scale on which the squared weights vary:
 * there the form acts like the kernel's spectral window times a local mean of w_t², so that the ratios are those of the window, from
 * convolutions of the lag weights alone, times those of the local means. O(nL).
 */
export function localRatios(squares: Float64Array, kernel: Kernel, bandwidth: number): MomentRatios {
  const n = squares.length;
  const reach = kernel.finite ? n : Math.ceil(REACH * bandwidth) + 1;
  const last = Math.min(lastLag(kernel, bandwidth, n), reach);
  const row = lagWeights(kernel, bandwidth, last);
  const window = windowSums(row);
  let first = 0;
  let second = 0;
  let third = 0;
  let fourth = 0;
  const padded = new Float64Array(n + 2 * last);
  padded.set(squares, last);
  const shares = row.map((weight) => (weight * weight) / window.second);
  for (let t = 0; t < n; t++) {
    const v = squares[t]!;
    if (v === 0) continue;
    let mean = shares[0]! * v;
    for (let j = 1; j <= last; j++) mean += shares[j]! * (padded[last + t - j]! + padded[last + t + j]!);
    first += v;
    second += v * mean;
    third += v * mean * mean;
    fourth += v * mean * mean * mean;
  }
  return {
    third: ((window.third / window.second ** 2) * first * third) / second ** 2,
    fourth: ((window.fourth / window.second ** 3) * first ** 2 * fourth) / second ** 3,
  };
}

const windows = new Map<string, { second: number; third: number; fourth: number }>();

/** Σκ_j², Σ(κ*κ)_j κ_j and Σ(κ*κ)_j² over all lags of both signs: the window's second, third and fourth moments. */
function windowSums(row: Float64Array): { second: number; third: number; fourth: number } {
  const key = `${row.length} ${row[1] ?? 0} ${row[row.length - 1]}`;
  let sums = windows.get(key);
  if (sums) return sums;
  const last = row.length - 1;
  const at = (j: number): number => row[Math.abs(j)] ?? 0;
  let second = 0;
  let third = 0;
  let fourth = 0;
  for (let d = 0; d <= 2 * last; d++) {
    let product = 0;
    for (let j = d - last; j <= last; j++) product += at(j) * at(d - j);
    const times = d === 0 ? 1 : 2;
    second += times * at(d) ** 2;
    third += times * product * at(d);
    fourth += times * product * product;
  }
  sums = { second, third, fourth };
  if (windows.size > 200) windows.clear();
  windows.set(key, sums);
  return sums;
}
