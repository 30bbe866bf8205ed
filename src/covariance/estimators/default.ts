import type { CovarianceEstimator } from "../../estimate/index.js";
import { batches } from "./batches.js";
import { calibrated } from "./calibrated.js";
import { classical } from "./classical.js";
import { cosine } from "./cosine.js";
import { hac, neweyWest } from "./hac.js";
import { white } from "./white.js";

/**
 * What a fit is judged by when nothing is said: Newey–West with bandwidth ⌈1.3 √T⌉, fixed-b critical values and the factor
 * T/(T − k) (Lazarus, Lewis, Stock and Watson 2018).
 */
export function defaultEstimator(): CovarianceEstimator {
  return neweyWest();
}

/** Up to here the calibrated law is cheap enough to be computed unasked. */
export const CALIBRATED_UP_TO = 2000;

/** The twelve that a comparison shows when none are named. */
export function defaultComparison(T: number): CovarianceEstimator[] {
  return [
    classical(),
    white("HC1"),
    white("HC3"),
    neweyWest(),
    hac({ kernel: "bartlett", bandwidth: "andrews" }),
    hac({ kernel: "bartlett", bandwidth: "newey-west" }),
    hac({ kernel: "parzen", bandwidth: "andrews" }),
    hac({ kernel: "quadratic spectral", bandwidth: "andrews" }),
    hac({ kernel: "parzen", bandwidth: "andrews", prewhiten: true }),
    cosine(),
    batches(),
    T <= CALIBRATED_UP_TO ? calibrated() : hac({ kernel: "bartlett", bandwidth: "cube-root" }),
  ];
}
