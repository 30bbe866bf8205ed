export { type Design, type DesignOptions, design, interceptLabel } from "./design.js";
export { columnsOf, labelOf } from "./resolve.js";
export { isTerm, type Term, type TermColumn, type TermLike } from "./term.js";
export {
  between,
  fourier,
  pulse,
  ramp,
  type SeasonalOptions,
  seasonal,
  step,
  trend,
} from "./terms/calendar.js";
export { type DifferenceOptions, diff, growth } from "./terms/difference.js";
export { categories, own } from "./terms/groups.js";
export { rolling } from "./terms/rolling.js";
export { lag, lags, lead } from "./terms/shift.js";
export { log, product, standardise, times } from "./terms/transform.js";
