import { suggestion } from "../../data/index.js";
import type { Covariance, CovarianceEstimator, Regression } from "../../estimate/index.js";
import { InputError } from "../../numeric/index.js";
import { type KernelName, kernelNamed } from "../kernels.js";
import { type Law, laws, minds } from "../laws/choice.js";
import { requireErrors } from "../remarks.js";
import { type BandwidthRule, requireBandwidth, ruleTitle } from "../rules/bandwidth.js";
import { hacCovariance } from "./hac-covariance.js";

export interface HacOptions {
  /** `bartlett` unless said. */
  readonly kernel?: KernelName;
  /**
   * Bandwidth S, lag j weighs κ(j/S): a number, or a rule, `andrews` (AR(1) plug-in, 1991), `newey-west` (plug-in, 1994), `square-root`
   * (⌈1.3 √T⌉) or `cube-root` (0.75 T^(1/3)). Unless said `square-root` for Bartlett and `andrews` for the others.
   */
  readonly bandwidth?: number | BandwidthRule;
  /** Take out a first-order vector autoregression of the scores first; false unless said. */
  readonly prewhiten?: boolean;
  /** Multiply by T/(T − k); true unless said. */
  readonly factor?: boolean;
  /**
   * What t ratios are judged by. `fixed-b` takes the bandwidth into account, on the design at hand up to 1,000 periods and in the limit
   * beyond; `fixed-b limit` is the limit at any length; `t` and `normal` ignore the bandwidth. Unless said `fixed-b` for
   * kernels that cannot give a negative variance and `t` for the truncated and Tukey–Hanning ones, for which fixed-b has no law here.
   */
  readonly law?: Law;
}

/**
 * A kernel estimator robust to uneven variance and to errors that carry over:
 * c (X'X)⁻¹ (Σ_j κ(j/S) Σ_t x_t û_t û_{t−j} x'_{t−j}) (X'X)⁻¹, c = T/(T − k) or 1. Newey and West 1987; Andrews 1991;
 * Andrews and Monahan 1992; Kiefer and Vogelsang 2005.
 *
 * @throws InputError for an unknown kernel, rule or law, a bandwidth of zero or less, and on a fit one beyond its periods.
 */
export function hac(options: HacOptions = {}): CovarianceEstimator {
  const kernel = kernelNamed(options.kernel ?? "bartlett", "hac");
  const bandwidth = options.bandwidth ?? (kernel.name === "bartlett" ? "square-root" : "andrews");
  requireBandwidth(bandwidth, kernel, "hac");
  const { prewhiten = false, factor = true } = options;
  const law = options.law ?? (kernel.positive ? "fixed-b" : "t");
  requireLaw(law, kernel.positive, kernel.title);
  const rule = typeof bandwidth === "number" ? `bandwidth ${bandwidth}` : ruleTitle(bandwidth);
  return {
    kind: "hac",
    label: `${kernel.title}, ${rule}${prewhiten ? ", prewhitened" : ""}`,
    options: { kernel: kernel.name, bandwidth, prewhiten, factor, law },
    on: (regression) => onRegression(regression, { kernel, bandwidth, prewhiten, factor, law, asked: "hac" }),
  };
}

function requireLaw(law: Law, positive: boolean, kernel: string): void {
  if (!laws.includes(law)) throw new InputError(`hac: there is no law "${law}".${suggestion(law, laws)}`);
  if (minds(law) && !positive) {
    throw new InputError(
      `hac: the ${kernel} kernel can give a negative variance, so its t ratio has no fixed-b law. ` +
        `Use law: "t" or "normal", or the "bartlett", "parzen", "quadratic spectral" or "daniell" kernel.`,
    );
  }
}

export interface NeweyWestOptions {
  /** Lags that weigh in; ⌈1.3 √T⌉ − 1 unless said. The bandwidth is one more. */
  readonly lags?: number;
  /** Multiply by T/(T − k); true unless said. */
  readonly factor?: boolean;
  /** `fixed-b` unless said; see `HacOptions`. */
  readonly law?: Law;
}

/**
 * Newey and West (1987): Bartlett weights 1 − j/(L + 1) on L lags, which is bandwidth L + 1. With nothing said L + 1 = ⌈1.3 √T⌉, and t ratios
 * are judged by fixed-b law (Lazarus, Lewis, Stock and Watson 2018).
 *
 * @throws InputError for a number of lags that is negative or not whole.
 */
export function neweyWest(options: NeweyWestOptions = {}): CovarianceEstimator {
  const { lags, factor = true, law = "fixed-b" } = options;
  if (lags !== undefined && !(Number.isInteger(lags) && lags >= 0)) {
    throw new InputError(
      `neweyWest: lags must be a whole number from 0 on, not ${lags}. The bandwidth of L lags is L + 1.`,
    );
  }
  requireLaw(law, true, "Bartlett");
  const kernel = kernelNamed("bartlett", "neweyWest");
  const bandwidth = lags === undefined ? "square-root" : lags + 1;
  return {
    kind: "newey-west",
    label: "Newey–West",
    options: { ...(lags === undefined ? {} : { lags }), factor, law },
    on: (regression) =>
      onRegression(regression, {
        kernel,
        bandwidth,
        prewhiten: false,
        factor,
        law,
        asked: "neweyWest",
        title: "Newey–West",
      }),
  };
}

function onRegression(regression: Regression, request: Parameters<typeof hacCovariance>[1]): Covariance {
  requireErrors(regression, request.asked);
  return hacCovariance(regression, request);
}
