import { incompleteBeta } from "./special.js";
import { tailQuantile } from "./tail-quantile.js";

function upper(x: number, df: number): number {
  if (Number.isNaN(x)) return Number.NaN;
  if (x < 0) return 1 - upper(-x, df);
  if (x === Number.POSITIVE_INFINITY) return 0;
  // P(T > x) = ½ I_{ν/(ν+x²)}(ν/2, ½); the smaller argument keeps its digits.
  const square = x * x;
  if (square > df) return incompleteBeta(df / (df + square), df / 2, 0.5, true, false) / 2;
  return incompleteBeta(square / (df + square), 0.5, df / 2, true, true) / 2;
}

function upperQuantile(p: number, df: number): number {
  if (p > 0.5) return -upperQuantile(1 - p, df);
  return tailQuantile((x) => upper(x, df), p);
}

/** Student's t distribution with `df` > 0 degrees of freedom, not necessarily whole. */
export const studentT = {
  /** P(T ≤ x). */
  cdf: (x: number, df: number) => upper(-x, df),
  /** P(T > x). */
  upper,
  /** The x with P(T ≤ x) = p. */
  quantile: (p: number, df: number) => -upperQuantile(p, df),
  /** The x with P(T > x) = p. */
  upperQuantile,
};
