import { InputError } from "../../numeric/index.js";
import { suggestion } from "../nearest.js";
import { mod, unitOrdinal } from "./calendar.js";
import type { WrittenForm } from "./forms.js";
import { type Step, type StepUnit, stepUnits, unitMilliseconds } from "./step.js";

const dayMilliseconds = 86_400_000;

/** `"month"`, `"15 minutes"`, `"2 weeks"` or a step already. Throws InputError with the nearest unit. */
export function parseStep(every: string | Step): Step {
  if (typeof every !== "string") return every;
  const [, count, word] = /^\s*(\d+)?\s*([a-z][a-z -]*?)\s*$/i.exec(every) ?? [];
  const singular = (word ?? every).toLowerCase().replace(/[ _]/g, "-").replace(/s$/, "");
  const unit = stepUnits.find((name) => name === singular);
  if (!unit || count === "0") {
    throw new InputError(`${JSON.stringify(every)} is no step of time.${suggestion(singular, stepUnits)}`);
  }
  return { unit, count: count ? Number(count) : 1 };
}

/** The step that periods written in one form are apart: instants in ascending order, in milliseconds. */
export function inferStep(instants: Float64Array, form: WrittenForm): Step | undefined {
  switch (form) {
    case "integer":
      return withCount("integer", instants);
    case "year":
    case "half-year":
    case "quarter":
    case "month":
    case "week":
      return withCount(form, instants);
    case "date-time":
      return isDaily(instants) ? inferFromDates(instants) : inferFromClock(instants);
    default:
      return inferFromDates(instants);
  }
}

/** Whether every instant falls on the same time of day, in the wall time that it was written in. */
function isDaily(instants: Float64Array): boolean {
  const clock = mod(instants[0]!, dayMilliseconds);
  return instants.length > 1 && instants.every((at) => mod(at, dayMilliseconds) === clock);
}

function inferFromClock(instants: Float64Array): Step | undefined {
  const gap = commonGap(instants);
  if (gap === 0) return undefined;
  for (const unit of ["day", "hour", "minute", "second", "millisecond"] as const) {
    if (gap % unitMilliseconds[unit]! === 0) return withCount(unit, instants);
  }
  return undefined;
}

function inferFromDates(instants: Float64Array): Step | undefined {
  const days = instants.map((at) => Math.floor(at / dayMilliseconds));
  const gap = commonGap(days);
  if (gap === 0) return undefined;
  if (standOnOneDayOfMonth(days) && days.length > 1 && smallestGap(days) >= 28) {
    const months = instants.map((at) => unitOrdinal("month", at));
    const apart = commonGap(months);
    const start = mod(months[0]!, apart);
    if (apart % 12 === 0 && mod(months[0]!, 12) === 0) return withCount("year", instants);
    if (apart % 6 === 0 && apart % 12 !== 0 && start % 6 === 0) return withCount("half-year", instants);
    if (apart % 3 === 0 && apart % 6 !== 0 && start % 3 === 0) return withCount("quarter", instants);
    return withCount("month", instants);
  }
  if (gap % 7 === 0) return withCount("week", instants);
  const weekend = days.some((day) => mod(day + 3, 7) >= 5);
  const crossed = days.some((day, i) => i > 0 && mod(day + 3, 7) === 0 && day - days[i - 1]! === 3);
  if (!weekend && crossed) return withCount("business-day", instants);
  return withCount("day", instants);
}

/** All on the 15th, say, or all on the last day of their months. */
function standOnOneDayOfMonth(days: Float64Array): boolean {
  const dates = Array.from(days, (day) => new Date(day * dayMilliseconds));
  const first = dates[0]!.getUTCDate();
  if (dates.every((date) => date.getUTCDate() === first)) return true;
  return days.every((day) => new Date((day + 1) * dayMilliseconds).getUTCDate() === 1);
}

function withCount(unit: StepUnit, instants: Float64Array): Step {
  const units = instants.map((at) => unitOrdinal(unit, at));
  const count = commonGap(units) || 1;
  const offset = mod(units[0]!, count);
  return offset === 0 ? { unit, count } : { unit, count, offset };
}

/** Greatest common divisor of the distances between neighbours; 0 when there is but one. */
function commonGap(values: Float64Array): number {
  let gap = 0;
  for (let i = 1; i < values.length && gap !== 1; i++) {
    let a = Math.abs(values[i]! - values[i - 1]!);
    while (a) [gap, a] = [a, gap % a];
  }
  return gap;
}

function smallestGap(values: Float64Array): number {
  let smallest = Number.POSITIVE_INFINITY;
  for (let i = 1; i < values.length; i++) {
    const gap = Math.abs(values[i]! - values[i - 1]!);
    if (gap > 0 && gap < smallest) smallest = gap;
  }
  return smallest;
}
