import type { Regression } from "../../estimate/index.js";
import { columnOf } from "../../numeric/index.js";

/** What one period does to a fit. */
export interface PeriodInfluence {
  readonly row: number;
  /** Position on the time axis. */
  readonly period: number;
  /** Diagonal of X(X'X)⁻¹X'. */
  readonly leverage: number;
  /** Residual over its standard deviation with this period left out of s; NaN at leverage one. */
  readonly studentised: number;
  /** Cook's distance; NaN at leverage one. */
  readonly cook: number;
  /** Per term, how far leaving the period out moves the coefficient: β̂ − β̂₍ₜ₎ over s₍ₜ₎√Gⱼⱼ; NaN at leverage one. */
  readonly dfbetas: readonly number[];
}

/** Leverage from which on a period counts as fitted exactly. */
export const exact = 1 - 1e-10;

/**
 * Leave-one-out figures for every period (Cook 1977; Belsley, Kuh and Welsch 1980), all in closed form from one fit:
 * s₍ₜ₎² = [(T−k)s² − ê²/(1−h)]/(T−k−1), Cook = ê²h/(k s²(1−h)²), DFBETAS = (Gxₜ)ⱼ ê/(1−h)/(s₍ₜ₎√Gⱼⱼ).
 */
export function periodInfluence(m: Regression): PeriodInfluence[] {
  const { T, k, residuals, leverage } = m;
  const s2 = m.rss / (T - k);
  const columns = Array.from({ length: k }, (_, j) => columnOf(m.X, j));
  const size = columns.map((_, j) => Math.sqrt(m.gramInverse.data[j * k + j]!));
  return Array.from({ length: T }, (_, row) => {
    const h = leverage[row]!;
    const e = residuals[row]!;
    const about = { row, period: m.periods[row]!, leverage: h };
    if (h > exact || T - k < 2)
      return { ...about, studentised: Number.NaN, cook: Number.NaN, dfbetas: columns.map(() => Number.NaN) };
    const rest = 1 - h;
    const without = Math.sqrt(Math.max(0, ((T - k) * s2 - (e * e) / rest) / (T - k - 1)));
    const dfbetas = columns.map((_, j) => {
      let move = 0;
      for (let i = 0; i < k; i++) move += m.gramInverse.data[i * k + j]! * columns[i]![row]!;
      return (move * e) / rest / (without * size[j]!);
    });
    return {
      ...about,
      studentised: e / (without * Math.sqrt(rest)),
      cook: (e * e * h) / (k * s2 * rest * rest),
      dfbetas,
    };
  });
}
