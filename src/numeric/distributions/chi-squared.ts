import { incompleteGamma } from "./special.js";
import { tailQuantile } from "./tail-quantile.js";

const upper = (x: number, df: number) => (x <= 0 ? 1 : incompleteGamma(x / 2, df / 2, true, true));
const upperQuantile = (p: number, df: number) => tailQuantile((x) => upper(x, df), p);

/** The χ² distribution with `df` > 0 degrees of freedom. */
export const chiSquared = {
  /** P(χ² ≤ x). */
  cdf: (x: number, df: number) => (x <= 0 ? 0 : incompleteGamma(x / 2, df / 2, true, false)),
  /** P(χ² > x). */
  upper,
  /** The x with P(χ² ≤ x) = p. */
  quantile: (p: number, df: number) => upperQuantile(1 - p, df),
  /** The x with P(χ² > x) = p. */
  upperQuantile,
};
