import { epochDay, epochDayOfWeek } from "./calendar.js";
import { zoneClock } from "./zone.js";

/** How a period can be written. */
export type WrittenForm =
  | "year"
  | "half-year"
  | "quarter"
  | "month"
  | "week"
  | "date"
  | "date-time"
  | "integer"
  | "day-month"
  | "month-day";

/** What is known about a column of written periods. */
export interface FormOptions {
  /** How 03/04/2024 is to be read; refused without it. */
  readonly dates?: "day-month" | "month-day";
  /** IANA zone of date-times written without an offset; UTC without it. */
  readonly zone?: string;
  /**
   * The hour that the end of daylight saving repeats: its first pass, its second, or both in the order in which they
   * stand in the file. Refused without it.
   */
  readonly repeatedHour?: "earlier" | "later" | "in order";
}

/** A period read, or what is wrong with it. */
export type Reading =
  | {
      readonly form: WrittenForm;
      /** Start of the period in milliseconds of UTC; of dates and longer periods, of their midnight as if in UTC. */
      readonly milliseconds: number;
      /** The same on the clock that the text was written by: differs where an offset or a zone is known. */
      readonly wall: number;
    }
  | { readonly problem: string };

const dayMilliseconds = 86_400_000;
const dateTime =
  /^(\d{4})-(\d{2})-(\d{2})[T ](\d{2})(?::?(\d{2})(?::?(\d{2})(?:[.,](\d{1,9}))?)?)?\s?(Z|[+-]\d{2}(?::?\d{2})?)?$/;

/** The written form of a text, by its shape alone. */
export function formOf(text: string, dates?: "day-month" | "month-day"): WrittenForm | undefined {
  if (/^\d{4}$/.test(text)) return "year";
  if (/^[+-]?\d+$/.test(text)) return "integer";
  if (/^\d{4}[- ]?[Hh][12]$/.test(text)) return "half-year";
  if (/^\d{4}[- ]?[Qq][1-4]$/.test(text)) return "quarter";
  if (/^\d{4}-\d{2}$/.test(text) || /^\d{4}[Mm]\d{2}$/.test(text)) return "month";
  if (/^\d{4}-?[Ww]\d{2}$/.test(text)) return "week";
  if (/^\d{4}-\d{2}-\d{2}$/.test(text)) return "date";
  if (dateTime.test(text)) return "date-time";
  if (slashes.test(text)) return dates ?? "day-month";
  return undefined;
}

const slashes = /^(\d{1,2})([/.-])(\d{1,2})\2(\d{4})$/;

/** Whether a text is a date whose day and month cannot be told apart by its form. */
export function isAmbiguous(text: string): boolean {
  return slashes.test(text);
}

/** Reads one written period. Text is trimmed first. */
export function readInstant(written: string, options: FormOptions = {}): Reading {
  const text = written.trim();
  const form = formOf(text, options.dates);
  const year = Number(text.slice(0, 4));
  const days = (day: number | undefined, form: WrittenForm): Reading =>
    day === undefined
      ? { problem: "there is no such date" }
      : { milliseconds: day * dayMilliseconds, wall: day * dayMilliseconds, form };
  switch (form) {
    case undefined:
      return { problem: "no known written form of a period" };
    case "year":
      return days(epochDay(year, 1, 1), form);
    case "half-year":
      return days(epochDay(year, text.endsWith("2") ? 7 : 1, 1), form);
    case "quarter":
      return days(epochDay(year, 3 * Number(text.slice(-1)) - 2, 1), form);
    case "month":
      return days(epochDay(year, Number(text.slice(-2)), 1), form);
    case "week":
      return days(epochDayOfWeek(year, Number(text.slice(-2))), form);
    case "date":
      return days(epochDay(year, Number(text.slice(5, 7)), Number(text.slice(8))), form);
    case "day-month":
    case "month-day": {
      if (!options.dates) {
        return {
          problem: `day and month cannot be told apart; say dates: "day-month" or dates: "month-day"`,
        };
      }
      const [, a, , b, y] = slashes.exec(text)!;
      const [day, month] = form === "day-month" ? [a, b] : [b, a];
      return days(epochDay(Number(y), Number(month), Number(day)), form);
    }
    case "date-time":
      return readDateTime(text, options);
    case "integer":
      return { milliseconds: Number(text), wall: Number(text), form };
  }
}

function readDateTime(text: string, options: FormOptions): Reading {
  const [, year, month, day, hour, minute = "00", second = "00", fraction = "0", offset] =
    dateTime.exec(text)!;
  const start = epochDay(Number(year), Number(month), Number(day));
  if (start === undefined || Number(hour) > 23 || Number(minute) > 59 || Number(second) > 59) {
    return { problem: "there is no such date and time" };
  }
  if (/[1-9]/.test(fraction.slice(3))) return { problem: "it is finer than a millisecond" };
  const clock = Number(hour) * 3_600_000 + Number(minute) * 60_000 + Number(second) * 1_000;
  const wall = start * dayMilliseconds + clock + Number(fraction.slice(0, 3).padEnd(3, "0"));
  if (offset !== undefined) {
    const ahead = offsetMilliseconds(offset);
    if (ahead === undefined) return { problem: `there is no offset ${offset}` };
    return { milliseconds: wall - ahead, wall, form: "date-time" };
  }
  if (!options.zone) return { milliseconds: wall, wall, form: "date-time" };
  const instant = instantOfWall(wall, options.zone, options.repeatedHour);
  return typeof instant === "string"
    ? { problem: instant }
    : { milliseconds: instant, wall, form: "date-time" };
}

function offsetMilliseconds(offset: string): number | undefined {
  if (offset === "Z") return 0;
  const sign = offset.startsWith("-") ? -1 : 1;
  const digits = offset.slice(1).replace(":", "").padEnd(4, "0");
  const [hours, minutes] = [Number(digits.slice(0, 2)), Number(digits.slice(2))];
  return hours > 18 || minutes > 59 ? undefined : sign * (hours * 60 + minutes) * 60_000;
}

/** Wall time to instant, or why there is none: a time that the clock skips is no time, one that it repeats needs a word. */
export function instantOfWall(
  wall: number,
  zone: string,
  repeatedHour?: FormOptions["repeatedHour"],
): number | string {
  const instants = zoneClock(zone).instantsOf(wall);
  if (instants.length === 1) return instants[0]!;
  if (instants.length === 0) return `the clocks of ${zone} skip this time when daylight saving begins`;
  if (repeatedHour === "earlier") return instants[0]!;
  if (repeatedHour === "later") return instants[instants.length - 1]!;
  return (
    `the clocks of ${zone} show this time twice when daylight saving ends; write the offset (+01:00), or say ` +
    'repeatedHour: "earlier", "later" or "in order"'
  );
}
