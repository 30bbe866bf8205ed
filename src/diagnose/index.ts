export type { CheckupLine } from "./checkup/lines.js";
export { Checkup, type CheckupOptions, checkup } from "./checkup.js";
export { Cointegration, type CointegrationOptions, cointegration } from "./cointegration.js";
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
export { Diagnostic, type DiagnosticFields, type RowTimes } from "./diagnostic.js";
export type { PartialResiduals } from "./form/partial-residuals.js";
export type { QuantilePoint } from "./form/quantiles.js";
export { Form, type FormOptions, form } from "./form.js";
export type { Reading } from "./integration/reading.js";
export type { SeriesSource } from "./integration/series.js";
export {
  Integration,
  type IntegrationOptions,
  integration,
  type SeriesIntegration,
} from "./integration.js";
export type { Collinearity } from "./leverage/collinearity.js";
export type { PeriodInfluence } from "./leverage/periods.js";
export { type Block, Leverage, type LeverageOptions, leverage } from "./leverage.js";
export type { Scale } from "./spread/paths.js";
export { Spread, type SpreadOptions, spread } from "./spread.js";
export { type Spurious, spuriousAlarm } from "./spurious.js";
export { Stability, type StabilityOptions, type StabilityRegime, stability } from "./stability.js";
export type { Fitted } from "./subject.js";
export type { Test } from "./test.js";
