import type { TimeTable } from "../data/index.js";
import { type DesignOptions, design, type TermLike } from "../design/index.js";
import { requireLevel } from "./coefficients.js";
import type { CovarianceEstimator } from "./covariance-estimator.js";
import { type ErrorModel, requireErrorModel } from "./errors.js";
import { Fit, type FitParts } from "./fit.js";
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

/** A regression of `outcome` on `terms` by least squares, judged by `estimator` unless the options name another. */
export function estimate(
  table: TimeTable,
  outcome: TermLike,
  terms: TermLike | readonly TermLike[],
  options: FitOptions,
  estimator: CovarianceEstimator,
  watch: NonNullable<FitParts["watch"]> = [],
): Fit {
  const level = options.level ?? 0.95;
  requireLevel(level);
  requireErrorModel(options.errors);
  const made = design(table, outcome, terms, options);
  const regression = regress(made);
  return new Fit({
    table,
    design: made,
    regression,
    estimator: options.covariance ?? estimator,
    level,
    watch,
  });
}
