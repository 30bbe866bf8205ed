import { incompleteBeta } from "./special.js";
import { tailQuantile } from "./tail-quantile.js";

function share(x: number, df1: number, df2: number, upperTail: boolean): number {
  if (Number.isNaN(x)) return Number.NaN;
  if (x <= 0) return upperTail ? 1 : 0;
  if (x === Number.POSITIVE_INFINITY) return upperTail ? 0 : 1;
  const product = df1 * x;
  if (product > df2) return incompleteBeta(df2 / (df2 + product), df2 / 2, df1 / 2, true, !upperTail);
  return incompleteBeta(product / (df2 + product), df1 / 2, df2 / 2, true, upperTail);
}

const upper = (x: number, df1: number, df2: number) => share(x, df1, df2, true);
const upperQuantile = (p: number, df1: number, df2: number) => tailQuantile((x) => upper(x, df1, df2), p);

/** Fisher's F distribution with `df1` and `df2` degrees of freedom. */
export const fisher = {
  /** P(F ≤ x). */
  cdf: (x: number, df1: number, df2: number) => share(x, df1, df2, false),
  /** P(F > x). */
  upper,
  /** The x with P(F ≤ x) = p. */
  quantile: (p: number, df1: number, df2: number) => upperQuantile(1 - p, df1, df2),
  /** The x with P(F > x) = p. */
  upperQuantile,
};
