import { InputError } from "../numeric/index.js";
import type { Covariance } from "./covariance-estimator.js";
import type { Regression } from "./regression.js";

/** One coefficient under the covariance estimator that is on. NaN where the estimator can give no interval. */
export interface Coefficient {
  readonly term: string;
  readonly estimate: number;
  readonly se: number;
  /** estimate / se. */
  readonly statistic: number;
  readonly low: number;
  readonly high: number;
  /** Two-sided, under the estimator's reference law. */
  readonly p: number;
}

/**
 * The coefficients of a regression judged by a covariance, with intervals of a level. Without a covariance (a perfect
 * fit) and where a variance is not positive there are estimates and nothing else.
 */
export function judgedCoefficients(
  regression: Regression,
  covariance: Covariance | undefined,
  level: number,
): readonly Coefficient[] {
  const { coefficients, k, terms } = regression;
  const rows = terms.map((term, j): Coefficient => {
    const estimate = coefficients[j]!;
    const variance = covariance?.matrix.data[j * k + j] ?? Number.NaN;
    if (!covariance || !(variance > 0)) return { term, estimate, ...unjudged };
    const se = Math.sqrt(variance);
    const contrast = new Float64Array(k);
    contrast[j] = 1;
    const law = covariance.reference(contrast);
    const reach = law.critical(level) * se;
    const statistic = estimate / se;
    return {
      term,
      estimate,
      se,
      statistic,
      low: estimate - reach,
      high: estimate + reach,
      p: law.twoSided(statistic),
    };
  });
  return Object.freeze(rows.map((row) => Object.freeze(row)));
}

const unjudged = { se: Number.NaN, statistic: Number.NaN, low: Number.NaN, high: Number.NaN, p: Number.NaN };

/** Refuses a level that is no probability between 0 and 1. */
export function requireLevel(level: number): void {
  if (typeof level === "number" && level > 0 && level < 1) return;
  const hint = level >= 50 && level < 100 ? ` Did you mean ${level / 100}?` : "";
  throw new InputError(`the level of intervals must lie between 0 and 1, not ${String(level)}.${hint}`);
}
