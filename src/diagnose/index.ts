export type { LagTests } from "./dependence/by-lag.js";
export type { CumulativePeriodogram } from "./dependence/cumulative-periodogram.js";
export type { DurbinWatson } from "./dependence/durbin-watson.js";
export type { Inflation } from "./dependence/inflation.js";
export {
  type CorrelogramPoint,
  Dependence,
  type DependenceOptions,
  dependence,
} from "./dependence.js";
export { Diagnostic, type DiagnosticFields } from "./diagnostic.js";
export type { PartialResiduals } from "./form/partial-residuals.js";
export type { QuantilePoint } from "./form/quantiles.js";
export { Form, type FormOptions, form } from "./form.js";
export type { Collinearity } from "./leverage/collinearity.js";
export type { PeriodInfluence } from "./leverage/periods.js";
export { type Block, Leverage, type LeverageOptions, leverage } from "./leverage.js";
export type { Scale } from "./spread/paths.js";
export { Spread, type SpreadOptions, spread } from "./spread.js";
export { Stability, type StabilityOptions, type StabilityRegime, stability } from "./stability.js";
export type { Fitted } from "./subject.js";
export type { Test } from "./test.js";
