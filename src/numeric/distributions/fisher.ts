import { chiSquared } from "./chi-squared.js";
import { incompleteBeta } from "./incomplete-beta.js";
import type { Shares } from "./incomplete-gamma.js";
import { lowerQuantile, tailQuantile } from "./tail-quantile.js";

function shares(x: number, df1: number, df2: number): Shares {
  if (Number.isNaN(x)) return { lower: x, upper: x };
  if (x <= 0) return { lower: 0, upper: 1 };
  if (x === Number.POSITIVE_INFINITY) return { lower: 1, upper: 0 };
  if (df2 === Number.POSITIVE_INFINITY)
    return { lower: chiSquared.cdf(df1 * x, df1), upper: chiSquared.upper(df1 * x, df1) };
  const ratio = (df1 / df2) * x;
  return incompleteBeta(df1 / 2, df2 / 2, 1 / (1 + 1 / ratio), 1 / (1 + ratio));
}

const cdf = (x: number, df1: number, df2: number) => shares(x, df1, df2).lower;
const upper = (x: number, df1: number, df2: number) => shares(x, df1, df2).upper;

/** Fisher's F distribution with `df1` and `df2` degrees of freedom; infinite `df2` gives χ²(df1)/df1. NaN for others. */
export const fisher = {
  /** P(F ≤ x). */
  cdf,
  /** P(F > x). */
  upper,
  /** The x with P(F ≤ x) = p. */
  quantile: (p: number, df1: number, df2: number) =>
    p < 0.5 ? lowerQuantile((x) => cdf(x, df1, df2), p) : tailQuantile((x) => upper(x, df1, df2), 1 - p),
  /** The x with P(F > x) = p. */
  upperQuantile: (p: number, df1: number, df2: number) =>
    p > 0.5 ? lowerQuantile((x) => cdf(x, df1, df2), 1 - p) : tailQuantile((x) => upper(x, df1, df2), p),
};
