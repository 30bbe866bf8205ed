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

/**
 * The step that periods written in one form are apart; undefined when there is but one period. `instants` (UTC) and
 * `walls` (the clock as written) are in milliseconds, in ascending order.
 */
export function inferStep(instants: Float64Array, walls: Float64Array, form: WrittenForm): Step | undefined {
  if (instants.length === 0 || instants[0] === instants[instants.length - 1]) return undefined;
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
      return isDaily(walls) ? inferFromDates(walls) : inferFromClock(instants);
    default:
      return inferFromDates(walls);
  }
}

/** Whether every row stands at the same time of day on the clock that it was written by. */
function isDaily(walls: Float64Array): boolean {
  const clock = mod(walls[0]!, dayMilliseconds);
  return walls.every((at) => mod(at, dayMilliseconds) === clock);
}

function inferFromClock(instants: Float64Array): Step {
  const gap = commonGap(instants);
  // Not days: a day of 23 hours is none of the clock's steps.
  for (const unit of ["hour", "minute", "second"] as const) {
    if (gap % unitMilliseconds[unit]! === 0) return withCount(unit, instants);
  }
  return withCount("millisecond", instants);
}

function inferFromDates(walls: Float64Array): Step {
  const days = walls.map((at) => Math.floor(at / dayMilliseconds));
  const gap = commonGap(days);
  if (smallestGap(days) >= 28 && standOnOneDayOfMonth(days)) return inferFromMonths(walls, days);
  if (gap % 7 === 0) return withCount("week", walls);
  const weekend = days.some((day) => mod(day + 3, 7) >= 5);
  const crossed = days.some((day, i) => i > 0 && mod(day + 3, 7) === 0 && day - days[i - 1]! === 3);
  if (!weekend && crossed) return withCount("business-day", walls);
  return withCount("day", walls);
}

/** Years, half-years and quarters are told by their first month, or by the last days of their last months. */
function inferFromMonths(walls: Float64Array, days: Float64Array): Step {
  const months = walls.map((at) => unitOrdinal("month", at));
  const apart = commonGap(months);
  const atEnds = days.every(isLastOfMonth);
  for (const [unit, length] of [
    ["year", 12],
    ["half-year", 6],
    ["quarter", 3],
  ] as const) {
    const place = mod(months[0]!, length);
    if (apart % length === 0 && (place === 0 || (atEnds && place === length - 1)))
      return withCount(unit, walls);
  }
  return withCount("month", walls);
}

function isLastOfMonth(day: number): boolean {
  return new Date((day + 1) * dayMilliseconds).getUTCDate() === 1;
}

/** All on the 15th, say, or all on the last day of their months. */
function standOnOneDayOfMonth(days: Float64Array): boolean {
  const dayOfMonth = (day: number) => new Date(day * dayMilliseconds).getUTCDate();
  const first = dayOfMonth(days[0]!);
  if (days.every((day) => dayOfMonth(day) === first)) return true;
  return days.every(isLastOfMonth);
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
