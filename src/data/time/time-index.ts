import { InputError } from "../../numeric/index.js";
import { isClockUnit, isoWeek, mod, ordinalOfInstant, startOfPeriod, unitsOf } from "./calendar.js";
import { readInstant } from "./forms.js";
import { type Step, type StepUnit, seasonLength, stepName } from "./step.js";
import { zoneClock } from "./zone.js";

/** The time axis of a table: which period each row stands for. */
export interface TimeIndex {
  /** Distance of neighbouring periods. */
  readonly step: Step;
  /** Name of the time column. */
  readonly name: string;
  /** Whole steps from the unit's origin, one per row, strictly increasing; a jump above one is a gap. */
  readonly ordinals: Float64Array;
  /** Time zone that labels are written in; UTC without it. */
  readonly zone?: string;
}

type Axis = Pick<TimeIndex, "step" | "zone">;

/** Throws InputError, suggesting the nearest, for a name that is no IANA time zone. */
export function validZone(zone: string): void {
  zoneClock(zone);
}

const pad = (value: number, width = 2) => String(value).padStart(width, "0");
const yearText = (year: number) => (year < 0 ? `-${pad(-year, 6)}` : pad(year, 4));

/** A period as it is written on cards: `1987`, `2024H1`, `2024Q3`, `2024-03`, `2022-W14`, `2024-03-05`, `2024-03-05 14:15`. */
export function periodLabel(axis: Axis, ordinal: number): string {
  const { step, zone } = axis;
  const at = unitsOf(step, ordinal);
  switch (step.unit) {
    case "integer":
      return String(at);
    case "year":
      return yearText(at);
    case "half-year":
      return `${yearText(Math.floor(at / 2))}H${mod(at, 2) + 1}`;
    case "quarter":
      return `${yearText(Math.floor(at / 4))}Q${mod(at, 4) + 1}`;
    case "month":
      return `${yearText(Math.floor(at / 12))}-${pad(mod(at, 12) + 1)}`;
    case "week": {
      const { year, week } = isoWeek(at);
      return `${yearText(year)}-W${pad(week)}`;
    }
    case "day":
    case "business-day":
      return new Date(startOfPeriod(step, ordinal)).toISOString().slice(0, 10);
    default:
      return instantLabel(startOfPeriod(step, ordinal), step, zone);
  }
}

function instantLabel(instant: number, step: Step, zone?: string): string {
  const length = step.unit === "millisecond" ? 23 : step.unit === "second" ? 19 : 16;
  const wall = zone ? zoneClock(zone).wallOf(instant) : instant;
  const text = new Date(wall).toISOString().slice(0, length).replace("T", " ");
  return zone && zone !== "UTC" ? text + offsetText(wall - instant) : text;
}

/** An offset from UTC as ISO 8601 writes it. */
function offsetText(milliseconds: number): string {
  const minutes = Math.round(Math.abs(milliseconds) / 60_000);
  return `${milliseconds < 0 ? "-" : "+"}${pad(Math.floor(minutes / 60))}:${pad(minutes % 60)}`;
}

/** Labels of all rows. */
export function periodLabels(index: TimeIndex): string[] {
  return Array.from(index.ordinals, (ordinal) => periodLabel(index, ordinal));
}

/**
 * The ordinal of the period written in `text`, which may be any written form that names a period or an instant of
 * this axis: `"2021-W30"`, `"2021-07-28"` (the week that holds it), `2021`. Throws InputError when it cannot be read.
 */
export function parsePeriod(axis: Axis, text: string | number): number {
  const { step } = axis;
  if (step.unit === "integer") {
    const value = typeof text === "number" ? text : Number(text.trim());
    const ordinal = (value - (step.offset ?? 0)) / step.count;
    if (Number.isInteger(ordinal)) return ordinal;
    throw new InputError(
      `${JSON.stringify(text)} is not a period of this table, whose periods are whole numbers`,
    );
  }
  const read = readInstant(String(text), { zone: axis.zone });
  if ("problem" in read) {
    throw new InputError(
      `${JSON.stringify(text)} cannot be read as a period (${read.problem}); this table's periods are written like ` +
        `"${periodLabel(axis, ordinalOfInstant(step, Date.UTC(2024, 2, 5)))}"`,
    );
  }
  return ordinalOfInstant(step, isClockUnit(step.unit) ? read.milliseconds : read.wall);
}

/**
 * The last ordinal of the period written in `text`: of 2021 on a monthly axis, December. Like `parsePeriod` where the
 * text names no period longer than the step.
 */
export function parsePeriodEnd(axis: Axis, text: string | number): number {
  const { step, zone } = axis;
  const ordinal = parsePeriod(axis, text);
  if (step.unit === "integer") return ordinal;
  const read = readInstant(String(text), { zone });
  if ("problem" in read || read.form === "date-time" || read.form === "integer") return ordinal;
  const isDay = read.form === "date" || read.form === "day-month" || read.form === "month-day";
  const named: Step = { unit: isDay ? "day" : (read.form as StepUnit), count: 1 };
  const end = startOfPeriod(named, ordinalOfInstant(named, read.wall) + 1);
  const instant = zone && isClockUnit(step.unit) ? (zoneClock(zone).instantsOf(end)[0] ?? end) : end;
  if (step.unit === "business-day") {
    const weekday = new Date(instant - 1).getUTCDay();
    if (weekday === 0 || weekday === 6) return ordinalOfInstant(step, instant - 1) - 1; // of a weekend: its Friday
  }
  return Math.max(ordinal, ordinalOfInstant(step, instant - 1));
}

/**
 * Which season of the cycle a period belongs to, 0-based: 0 for January, Q1, Monday, the first hour. Hours and parts
 * of them count on the clock of `zone` (default UTC).
 */
export function seasonOf(step: Step, ordinal: number, zone?: string): number {
  const length = seasonLength(step);
  if (length === undefined) return 0;
  if (step.unit === "week") {
    const { week } = isoWeek(unitsOf(step, ordinal));
    return Math.min(Math.floor((week - 1) / step.count), length - 1); // week 53 counts with week 52
  }
  if (step.unit === "day") return mod(ordinal + 3, length); // 1970-01-01 was a Thursday
  if (zone && isClockUnit(step.unit)) {
    const wall = zoneClock(zone).wallOf(startOfPeriod(step, ordinal));
    return mod(ordinalOfInstant(step, wall), length);
  }
  return mod(ordinal, length);
}

/** Start of a period on the wall clock of the index's zone, in milliseconds; for days and longer, of their midnight. */
export function wallStart(axis: Axis, ordinal: number): number {
  const start = startOfPeriod(axis.step, ordinal);
  return axis.zone && isClockUnit(axis.step.unit) ? zoneClock(axis.zone).wallOf(start) : start;
}

/** Start of a period as a Date in UTC, for charts. Integers become years so far apart that only their order shows. */
export function periodDate(step: Step, ordinal: number): Date {
  return new Date(startOfPeriod(step, ordinal));
}

/** `2019-W01 to 2023-W52, every week`. */
export function spanText(index: TimeIndex): string {
  const { ordinals, step } = index;
  if (ordinals.length === 0) return "no periods";
  const first = periodLabel(index, ordinals[0]!);
  const last = periodLabel(index, ordinals[ordinals.length - 1]!);
  return `${first} to ${last}, every ${stepName(step)}`;
}
