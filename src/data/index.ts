export {
  type Column,
  countFilled,
  countMissing,
  isMissing,
  type NumberColumn,
  type TextColumn,
} from "./column.js";
export { findingsOf, gapsOf, missingStretches, type Stretch } from "./findings.js";
export { type LoadSource, load } from "./load/load.js";
export type { LoadOptions } from "./load/options.js";
export type { LagCorrelation } from "./look/correlation.js";
export type { Bin } from "./look/thin.js";
export { Look, type LookParts, type LookSeries, look } from "./look.js";
export { nearestName, suggestion } from "./nearest.js";
export { type Progress, reportProgress, showProgressIn } from "./progress.js";
export { requireRegular } from "./regular.js";
export { type Aggregate, first, last, max, mean, min, sum } from "./reshape/aggregates.js";
export { type Row, rowsOf } from "./reshape/define.js";
export { displaySymbol, type MimeBundle, presentWith, type Remark, Result } from "./result.js";
export { type ColumnSummary, columnSummary, smallLine } from "./summary.js";
export { type TableParts, type TableSource, TimeTable } from "./table.js";
export { countedSteps, type Step, type StepUnit, seasonLength, stepName } from "./time/step.js";
export {
  parsePeriod,
  parsePeriodEnd,
  periodDate,
  periodLabel,
  periodLabels,
  seasonOf,
  spanText,
  type TimeIndex,
} from "./time/time-index.js";
