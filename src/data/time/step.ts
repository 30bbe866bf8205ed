/** The calendar unit of a step. */
export type StepUnit =
  | "year"
  | "half-year"
  | "quarter"
  | "month"
  | "week"
  | "day"
  | "business-day"
  | "hour"
  | "minute"
  | "second"
  | "millisecond"
  | "integer";

/** The distance between neighbouring periods: a quarter-hour is `{ unit: "minute", count: 15 }`. */
export interface Step {
  readonly unit: StepUnit;
  readonly count: number;
  /** Where in the cycle of `count` units a period starts: 5 with `{ unit: "month", count: 12 }` means June. Default 0. */
  readonly offset?: number;
}

/** All units, the longest first. */
export const stepUnits: readonly StepUnit[] = [
  "year",
  "half-year",
  "quarter",
  "month",
  "week",
  "day",
  "business-day",
  "hour",
  "minute",
  "second",
  "millisecond",
  "integer",
];

/** Milliseconds of the units that have a fixed length. */
export const unitMilliseconds: Partial<Record<StepUnit, number>> = {
  week: 604_800_000,
  day: 86_400_000,
  hour: 3_600_000,
  minute: 60_000,
  second: 1_000,
  millisecond: 1,
};

/** `week`, `15 minutes`, `integer`. */
export function stepName(step: Step): string {
  if (step.count === 1) return step.unit === "business-day" ? "business day" : step.unit;
  const unit = step.unit === "business-day" ? "business day" : step.unit;
  return `${step.count} ${unit}s`;
}

/** What a number of such steps is called: `3 weeks`, `1 week`, `5 steps of 15 minutes`. */
export function countedSteps(count: number, step: Step): string {
  if (step.unit === "integer" || step.count !== 1) {
    return `${count} ${count === 1 ? "period" : "periods"}`;
  }
  const unit = step.unit === "business-day" ? "business day" : step.unit;
  return `${count} ${unit}${count === 1 ? "" : "s"}`;
}

/**
 * Periods in one season (a year; for days a week, for hours a day, for shorter steps a day): 12 for months, 4 for
 * quarters, 52 for weeks, 7 for days, 5 for business days, 24 for hours. Undefined where there is none.
 */
export function seasonLength(step: Step): number | undefined {
  const whole: Partial<Record<StepUnit, number>> = {
    "half-year": 2,
    quarter: 4,
    month: 12,
    week: 52,
    day: 7,
    "business-day": 5,
    hour: 24,
    minute: 1440,
    second: 86_400,
  };
  const length = whole[step.unit];
  if (length === undefined || length % step.count !== 0) return undefined;
  const count = length / step.count;
  return count > 1 ? count : undefined;
}
