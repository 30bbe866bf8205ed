import { kolmogorovUpper } from "../laws/kolmogorov.js";
import { kolmogorovPoint } from "../laws/kolmogorov-limit.js";
import { periodogram } from "../parts/fourier.js";
import { notComputed } from "../parts/laws.js";
import { hasGaps } from "../parts/time.js";
import type { Test } from "../test.js";

const name = "Cumulative periodogram";

/** The share of variance at or below each frequency. */
export interface CumulativePeriodogram {
  readonly test: Test;
  /** Cycles per period, at most `points` of them, with the share of variance up to each. */
  readonly path: readonly { readonly frequency: number; readonly share: number }[];
  /** White noise stays within `frequency`·2 ± this at the level asked for; by Stephens' (1970) factor, to about 0.001. */
  readonly band: number;
}

/**
 * Bartlett (1955), Durbin (1969): C_j, j = 1 .. n = ⌊(T−1)/2⌋, the cumulated periodogram over its total. Under normal
 * white noise C_1 .. C_{n−1} are ordered uniforms, so the two-sided distance goes by the exact one-sample law with
 * n−1; for residuals that is a large-sample statement. Needs twelve periods and no gaps.
 */
export function cumulativePeriodogram(
  values: Float64Array,
  periods: Float64Array,
  level: number,
  points = 400,
): CumulativePeriodogram {
  const T = values.length;
  const without = (note: string) => ({ test: notComputed(name, note), path: [], band: Number.NaN });
  if (T < 12) return without(`needs at least 12 periods, there are ${T}`);
  if (hasGaps(periods)) return without("needs every period from first to last, and some are missing");
  const ordinates = periodogram(values);
  const n = Math.floor((T - 1) / 2);
  const share = new Float64Array(n + 1);
  for (let j = 1; j <= n; j++) share[j] = share[j - 1]! + ordinates[j]!;
  const total = share[n]!;
  if (!(total > 0)) return without("the residuals do not vary at any frequency");
  const m = n - 1;
  let distance = 0;
  let where = 1;
  for (let j = 1; j <= n; j++) {
    share[j]! /= total;
    if (j > m) continue;
    const here = Math.max(j / m - share[j]!, share[j]! - (j - 1) / m);
    if (here > distance) {
      distance = here;
      where = j;
    }
  }
  const period = T / where;
  const test = {
    name,
    statistic: distance,
    df: [m],
    distribution: `exact distance of ${m} uniforms`,
    p: kolmogorovUpper(distance, m),
    valid: true,
    note: `furthest off at a cycle of ${period.toFixed(period < 10 ? 1 : 0)} periods`,
  };
  const every = Math.max(1, Math.ceil(n / points));
  const path: { frequency: number; share: number }[] = [];
  for (let j = 1; j <= n; j++)
    if (j % every === 0 || j === where || j === n) path.push({ frequency: j / T, share: share[j]! });
  return { test, path, band: kolmogorovPoint(1 - level) / (Math.sqrt(m) + 0.12 + 0.11 / Math.sqrt(m)) };
}
