import { norm } from "../numeric/index.js";
import type { Regression } from "./regression.js";

/**
 * How well a regression describes its outcome, each figure formed at first use. Two fits that differ in their
 * covariance estimator alone share one.
 */
export class Goodness {
  readonly #regression: Regression;
  #perfect: boolean | undefined;
  #rSquared: { readonly value: number; readonly about: "mean" | "zero" } | undefined;

  constructor(regression: Regression) {
    this.#regression = regression;
  }

  /** Whether the residuals are zero to rounding: ‖û‖ ≤ T ε ‖y‖. */
  get perfect(): boolean {
    const { residuals, y, T } = this.#regression;
    this.#perfect ??= norm(residuals) <= T * Number.EPSILON * norm(y);
    return this.#perfect;
  }

  /**
   * Share of the outcome's variation explained: about its mean where the columns span a constant, about zero
   * elsewhere. NaN for an outcome that does not vary.
   */
  get rSquared(): { readonly value: number; readonly about: "mean" | "zero" } {
    this.#rSquared ??= rSquaredOf(this.#regression);
    return this.#rSquared;
  }

  /** Gaussian log-likelihood with σ² at rss / T. */
  get logLikelihood(): number {
    const { T, rss } = this.#regression;
    return (-T / 2) * (Math.log(2 * Math.PI) + Math.log(rss / T) + 1);
  }

  /** −2ℓ + 2(k + 1); σ² counts as a parameter. */
  get aic(): number {
    return -2 * this.logLikelihood + 2 * (this.#regression.k + 1);
  }

  /** −2ℓ + (k + 1) log T. */
  get bic(): number {
    const { T, k } = this.#regression;
    return -2 * this.logLikelihood + (k + 1) * Math.log(T);
  }
}

function rSquaredOf(regression: Regression): { value: number; about: "mean" | "zero" } {
  const { y, T, rss } = regression;
  const about = spansConstant(regression) ? "mean" : "zero";
  let centre = 0;
  if (about === "mean") {
    for (let t = 0; t < T; t++) centre += y[t]!;
    centre /= T;
  }
  let total = 0;
  for (let t = 0; t < T; t++) total += (y[t]! - centre) ** 2;
  return { value: total > 0 ? 1 - rss / total : Number.NaN, about };
}

// A full set of levels spans the constant too: ‖1 − QQ'1‖ is then zero.
function spansConstant(regression: Regression): boolean {
  if (regression.interceptAt >= 0) return true;
  const { Q, T, k } = regression;
  let projected = 0;
  for (let j = 0; j < k; j++) {
    let sum = 0;
    for (let t = 0; t < T; t++) sum += Q.data[j * T + t]!;
    projected += sum * sum;
  }
  return Math.abs(T - projected) < 1e-12 * T;
}
