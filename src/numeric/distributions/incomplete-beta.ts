import type { Shares } from "./incomplete-gamma.js";
import { deviance, stirlingRest } from "./stirling.js";

/**
 * Regularised incomplete beta function I_x(a, b) and its complement for a, b > 0; y is 1 − x, given with its own
 * digits. Continued fraction (Abramowitz and Stegun 1964, 26.5.8) on the side where it converges fast, with the
 * density of Loader (2000) before it, which keeps its digits for large a and b.
 */
export function incompleteBeta(a: number, b: number, x: number, y: number): Shares {
  if (!(a > 0 && b > 0) || Number.isNaN(x) || Number.isNaN(y))
    return { lower: Number.NaN, upper: Number.NaN };
  if (x <= 0) return { lower: 0, upper: 1 };
  if (y <= 0) return { lower: 1, upper: 0 };
  const n = a + b;
  // xᵃ yᵇ / B(a, b)
  const front =
    Math.exp(stirlingRest(n) - stirlingRest(a) - stirlingRest(b) - deviance(a, n * x) - deviance(b, n * y)) *
    Math.sqrt((a / n) * (b / (2 * Math.PI)));
  // a − n x, from the smaller of x and y
  const excess = x < 0.5 ? a - n * x : n * y - b;
  if (excess > 0) {
    const lower = front * fraction(a, b, x, y, excess);
    return { lower, upper: 1 - lower };
  }
  const upper = front * fraction(b, a, y, x, -excess);
  return { lower: 1 - upper, upper };
}

/** I_x(a, b) B(a, b) / (xᵃ yᵇ) by the continued fraction of DiDonato and Morris (1992, eq. 9), convergents by recursion. */
function fraction(a: number, b: number, x: number, y: number, excess: number): number {
  let before = 0;
  let above = 1;
  let beforeBelow = 1;
  let below = (a * (excess + 1)) / (a + 1);
  let value = above / below;
  for (let n = 1; ; n++) {
    const weight = n * (b - n) * x;
    const s = a + 2 * n - 1;
    const alpha = ((a + n - 1) / s) * ((a + b + n - 1) / s) * weight * x;
    const beta = n + weight / s + ((a + n) / (s + 2)) * (excess + 1 + n * (1 + y));
    const nextAbove = alpha * before + beta * above;
    const nextBelow = alpha * beforeBelow + beta * below;
    const next = nextAbove / nextBelow;
    if (Math.abs(next - value) <= 1e-16 * next || n > 1e7) return next;
    value = next;
    before = above / nextBelow;
    beforeBelow = below / nextBelow;
    above = next;
    below = 1;
  }
}
