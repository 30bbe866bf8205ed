import { incompleteGamma } from "./incomplete-gamma.js";
import { lowerQuantile, tailQuantile } from "./tail-quantile.js";

const cdf = (x: number, df: number) => incompleteGamma(df / 2, x / 2).lower;
const upper = (x: number, df: number) => incompleteGamma(df / 2, x / 2).upper;

/** The χ² distribution with `df` > 0 degrees of freedom, not necessarily whole. NaN for other `df`. */
export const chiSquared = {
  /** P(χ² ≤ x). */
  cdf,
  /** P(χ² > x). */
  upper,
  /** The x with P(χ² ≤ x) = p. */
  quantile: (p: number, df: number) =>
    p < 0.5 ? lowerQuantile((x) => cdf(x, df), p) : tailQuantile((x) => upper(x, df), 1 - p),
  /** The x with P(χ² > x) = p. */
  upperQuantile: (p: number, df: number) =>
    p > 0.5 ? lowerQuantile((x) => cdf(x, df), 1 - p) : tailQuantile((x) => upper(x, df), p),
};
