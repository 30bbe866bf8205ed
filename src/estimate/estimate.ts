import type { TimeTable } from "../data/index.js";
import {
  type DesignOptions,
  design,
  designOptionNames,
  requireOptions,
  type TermLike,
} from "../design/index.js";
import { requireLevel } from "./coefficients.js";
import type { CovarianceEstimator } from "./covariance-estimator.js";
import { type ErrorModel, requireErrorModel } from "./errors.js";
import { requireEstimator } from "./estimator-required.js";
import { Fit } from "./fit.js";
import type { FitParts } from "./fit-parts.js";
import { regress } from "./regress.js";

/** Options of `fit`. */
export interface FitOptions extends DesignOptions {
  /** The covariance estimator that judges the coefficients. */
  readonly covariance?: CovarianceEstimator;
  /** How the errors are assumed to behave when estimating. Default `iid()`. */
  readonly errors?: ErrorModel;
  /** Level of the intervals. Default 0.95. */
  readonly level?: number;
}

/**
 * A regression of `outcome` on `terms` by least squares, judged by `estimator` unless the options name another. Throws
 * InputError for options that are not known, and for whatever `design` and `regress` refuse.
 */
export function estimate(
  table: TimeTable,
  outcome: TermLike,
  terms: TermLike | readonly TermLike[],
  options: FitOptions,
  estimator: CovarianceEstimator,
  watch: NonNullable<FitParts["watch"]> = [],
): Fit {
  requireOptions("fit", options, ["covariance", "errors", "level", ...designOptionNames]);
  const { covariance = estimator, errors, level = 0.95, ...forDesign } = options;
  requireLevel(level);
  requireErrorModel(errors);
  requireEstimator("fit", covariance);
  const made = design(table, outcome, terms, forDesign);
  const regression = regress(made);
  return new Fit({ table, design: made, regression, estimator: covariance, level, watch });
}
