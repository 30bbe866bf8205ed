import { Temporal } from "temporal-polyfill";
import { type Step, type StepUnit, unitMilliseconds } from "./step.js";

const dayMilliseconds = 86_400_000;

/** Days from 1970-01-01 to a date of the proleptic Gregorian calendar; undefined when there is no such date. */
export function epochDay(year: number, month: number, day: number): number | undefined {
  const at = new Date(0);
  at.setUTCFullYear(year, month - 1, day);
  if (at.getUTCFullYear() !== year || at.getUTCMonth() !== month - 1 || at.getUTCDate() !== day)
    return undefined;
  return at.getTime() / dayMilliseconds;
}

/** Days from 1970-01-01 to the Monday of an ISO week; undefined when the year has no such week. */
export function epochDayOfWeek(year: number, week: number): number | undefined {
  const fourth = epochDay(year, 1, 4)!; // 4 January is always in week 1
  const monday = fourth - mod(fourth + 3, 7) + 7 * (week - 1);
  const thursday = new Date((monday + 3) * dayMilliseconds);
  return week >= 1 && thursday.getUTCFullYear() === year ? monday : undefined;
}

/** Remainder that is never negative. */
export function mod(a: number, n: number): number {
  return ((a % n) + n) % n;
}

/**
 * The whole number of steps from the unit's origin to the period that holds an instant (milliseconds of UTC, or of
 * local wall time for dates). Weeks count Mondays, business days skip Saturday and Sunday.
 */
export function ordinalOfInstant(step: Step, milliseconds: number): number {
  return Math.floor((unitOrdinal(step.unit, milliseconds) - (step.offset ?? 0)) / step.count);
}

/** Whether periods of a unit are parts of a day, counted in UTC, and not days or longer, counted on the calendar. */
export function isClockUnit(unit: StepUnit): boolean {
  return unit === "hour" || unit === "minute" || unit === "second" || unit === "millisecond";
}

/** Whole units from the unit's origin to the one that holds an instant. */
export function unitOrdinal(unit: StepUnit, milliseconds: number): number {
  const fixed = unitMilliseconds[unit];
  if (unit === "week") return Math.floor((milliseconds / dayMilliseconds + 3) / 7);
  if (fixed !== undefined) return Math.floor(milliseconds / fixed);
  if (unit === "integer") return milliseconds;
  if (unit === "business-day") {
    const day = Math.floor(milliseconds / dayMilliseconds) + 3; // days since a Monday
    return 5 * Math.floor(day / 7) + Math.min(mod(day, 7), 5);
  }
  const date = new Date(milliseconds);
  const month = 12 * date.getUTCFullYear() + date.getUTCMonth();
  const months: Partial<Record<StepUnit, number>> = { year: 12, "half-year": 6, quarter: 3, month: 1 };
  return Math.floor(month / months[unit]!);
}

/** Units from the unit's origin to the start of a period. */
export function unitsOf(step: Step, ordinal: number): number {
  return ordinal * step.count + (step.offset ?? 0);
}

/** The instant (milliseconds) at which a period starts; the inverse of `ordinalOfInstant` at period starts. */
export function startOfPeriod(step: Step, ordinal: number): number {
  const at = unitsOf(step, ordinal);
  switch (step.unit) {
    case "week":
      return (7 * at - 3) * dayMilliseconds;
    case "business-day":
      return (7 * Math.floor(at / 5) + mod(at, 5) - 3) * dayMilliseconds;
    case "year":
      return monthStart(12 * at);
    case "half-year":
      return monthStart(6 * at);
    case "quarter":
      return monthStart(3 * at);
    case "month":
      return monthStart(at);
    case "integer":
      return at;
    default:
      return at * unitMilliseconds[step.unit]!;
  }
}

function monthStart(month: number): number {
  const date = new Date(0);
  date.setUTCFullYear(Math.floor(month / 12), mod(month, 12), 1);
  return date.getTime();
}

/** ISO week-numbering year and week of the Monday that lies `week` weeks after Monday 1969-12-29. */
export function isoWeek(week: number): { year: number; week: number } {
  const date = Temporal.Instant.fromEpochMilliseconds((7 * week - 3) * dayMilliseconds)
    .toZonedDateTimeISO("UTC")
    .toPlainDate();
  return { year: date.yearOfWeek!, week: date.weekOfYear! };
}
