import { incompleteBeta } from "./incomplete-beta.js";
import { normal } from "./normal.js";
import { tailQuantile } from "./tail-quantile.js";

function upper(x: number, df: number): number {
  if (Number.isNaN(x)) return x;
  if (df === Number.POSITIVE_INFINITY) return normal.upper(x);
  const ratio = (x / df) * x;
  // P(|T| > x) = I_{ν/(ν+x²)}(ν/2, ½). The variable and what it lacks to one each have all their digits.
  const beyond = incompleteBeta(0.5, df / 2, 1 / (1 + 1 / ratio), 1 / (1 + ratio));
  return x < 0 ? 0.5 + beyond.lower / 2 : beyond.upper / 2;
}

function upperQuantile(p: number, df: number): number {
  if (p > 0.5) return -upperQuantile(1 - p, df);
  return tailQuantile((x) => upper(x, df), p);
}

/** Student's t distribution with `df` > 0 degrees of freedom, not necessarily whole; infinite `df` gives the normal law. */
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
