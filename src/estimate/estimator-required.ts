import { InputError } from "../numeric/index.js";
import type { CovarianceEstimator } from "./covariance-estimator.js";

/** Refuses, in the name of what was asked, what is no covariance estimator. */
export function requireEstimator(asked: string, estimator: unknown): CovarianceEstimator {
  if (typeof (estimator as CovarianceEstimator | undefined)?.on === "function")
    return estimator as CovarianceEstimator;
  const hint = typeof estimator === "function" ? ` Call it: ${estimator.name || "the function"}().` : "";
  throw new InputError(
    `${asked}: a covariance estimator is wanted, such as neweyWest(), white("HC3") or classical().${hint}`,
  );
}
