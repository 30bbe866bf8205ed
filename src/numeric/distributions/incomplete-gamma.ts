import { deviance, stirlingRest } from "./stirling.js";

/** Both shares of a distribution, each computed to its own relative accuracy where it is the smaller. */
export interface Shares {
  readonly lower: number;
  readonly upper: number;
}

/**
 * Regularised incomplete gamma functions P(s, x) and Q(s, x), s > 0: the power series on the left, the continued
 * fraction on the right (Abramowitz and Stegun 1964, 6.5.29 and 6.5.31), with the density of Loader (2000) before them.
 */
export function incompleteGamma(s: number, x: number): Shares {
  if (!(s > 0) || Number.isNaN(x)) return { lower: Number.NaN, upper: Number.NaN };
  if (x <= 0) return { lower: 0, upper: 1 };
  if (x === Number.POSITIVE_INFINITY) return { lower: 1, upper: 0 };
  // xˢ e⁻ˣ / Γ(s + 1)
  const front = Math.exp(-stirlingRest(s) - deviance(s, x)) / Math.sqrt(2 * Math.PI * s);
  if (x < Math.max(s, 0.3)) {
    const lower = front * series(s, x);
    return { lower, upper: 1 - lower };
  }
  const upper = front * s * fraction(s, x);
  return { lower: 1 - upper, upper };
}

function series(s: number, x: number): number {
  let term = 1;
  let sum = 1;
  for (let n = 1; term > 1e-17 * sum; n++) {
    term *= x / (s + n);
    sum += term;
  }
  return sum;
}

/** Γ(s, x) / (xˢ e⁻ˣ) by Lentz's method as modified by Thompson and Barnett (1986). */
function fraction(s: number, x: number): number {
  const tiny = 1e-300;
  let b = x + 1 - s;
  let c = 1 / tiny;
  let d = 1 / (b || tiny);
  let h = d;
  for (let i = 1; ; i++) {
    const a = -i * (i - s);
    b += 2;
    d = 1 / (a * d + b || tiny);
    c = b + a / c || tiny;
    const step = c * d;
    h *= step;
    if (Math.abs(step - 1) < 2.3e-16 || a === 0) return h;
  }
}
