import type { Regression } from "../../estimate/index.js";
import { recursiveEnd } from "./recursive-coefficients.js";

/** The coefficients in one part of the sample. */
export interface Regime {
  /** First and last row of the part. */
  readonly from: number;
  readonly to: number;
  /** Per term; NaN where the part does not determine it. */
  readonly coefficients: readonly number[];
}

/** The terms fitted apart in each part between `breaks`. */
export function regimes(m: Regression, breaks: readonly number[]): Regime[] {
  const cuts = [0, ...breaks, m.T];
  return cuts.slice(1).map((end, i) => ({
    from: cuts[i]!,
    to: end - 1,
    coefficients: recursiveEnd(m, cuts[i]!, end - 1),
  }));
}
