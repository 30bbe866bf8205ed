// The cell functions, and nothing else.
import { defaultEstimator } from "./covariance/index.js";
import type { TimeTable } from "./data/index.js";
import type { TermLike } from "./design/index.js";
import { spuriousAlarm } from "./diagnose/index.js";
import { estimate, type Fit, type FitOptions } from "./estimate/index.js";

/**
 * A regression of `outcome` on `terms` by least squares: `fit(weeks, "riders", ["fare", lag("fare", 1), seasonal()])`.
 * An intercept is added unless `intercept: false`. With nothing said, coefficients are judged by Newey–West with
 * bandwidth 1.3√T and fixed-b critical values; `m.under(...)` judges them anew without estimating again. Periods that
 * a lag cannot reach fall out and are stated; a value missing inside the sample is refused unless
 * `missing: "leave out"`. Throws InputError naming the term, column or period of whatever is wrong.
 */
export function fit(
  table: TimeTable,
  outcome: TermLike,
  terms: TermLike | readonly TermLike[],
  options: FitOptions = {},
): Fit {
  return estimate(table, outcome, terms, options, defaultEstimator(), [
    (regression) => spuriousAlarm(regression)?.remark,
  ]);
}

export * from "./covariance/index.js";
export {
  displaySymbol,
  first,
  last,
  load,
  look,
  max,
  mean,
  min,
  sum,
  TimeTable,
} from "./data/index.js";
export type { Term, TermLike } from "./design/index.js";
export {
  between,
  categories,
  diff,
  fourier,
  growth,
  lag,
  lags,
  lead,
  log,
  own,
  product,
  pulse,
  ramp,
  rolling,
  seasonal,
  standardise,
  step,
  times,
  trend,
} from "./design/index.js";
export {
  checkup,
  cointegration,
  dependence,
  form,
  integration,
  leverage,
  spread,
  stability,
} from "./diagnose/index.js";
export type { Coefficient, CovarianceEstimator, FitOptions } from "./estimate/index.js";
export { Fit, iid } from "./estimate/index.js";
export { InputError } from "./numeric/index.js";
export { chart, tableOf } from "./show/index.js";
