import { Temporal } from "temporal-polyfill";
import { epochDay, epochDayOfWeek } from "./calendar.js";

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
  /** The repeated hour at the end of daylight saving: its first or its second pass. Refused without it. */
  readonly repeatedHour?: "earlier" | "later";
}

/** A period read: its start in milliseconds of UTC (dates and longer periods: of the calendar), or what is wrong. */
export type Reading =
  | { readonly milliseconds: number; readonly form: WrittenForm }
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
    day === undefined ? { problem: "there is no such date" } : { milliseconds: day * dayMilliseconds, form };
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
      return { milliseconds: Number(text), form };
  }
}

function readDateTime(text: string, options: FormOptions): Reading {
  const [, year, month, day, hour, minute = "00", second = "00", fraction = "0", offset] =
    dateTime.exec(text)!;
  const start = epochDay(Number(year), Number(month), Number(day));
  if (start === undefined || Number(hour) > 23 || Number(minute) > 59 || Number(second) > 59) {
    return { problem: "there is no such date and time" };
  }
  const clock = Number(hour) * 3_600_000 + Number(minute) * 60_000 + Number(second) * 1_000;
  const local = start * dayMilliseconds + clock + Math.floor(Number(`0.${fraction}`) * 1000);
  if (offset !== undefined) return { milliseconds: local - offsetMilliseconds(offset), form: "date-time" };
  if (!options.zone || options.zone === "UTC") return { milliseconds: local, form: "date-time" };
  return inZone(local, options);
}

function offsetMilliseconds(offset: string): number {
  if (offset === "Z") return 0;
  const sign = offset.startsWith("-") ? -1 : 1;
  const digits = offset.slice(1).replace(":", "").padEnd(4, "0");
  return sign * (Number(digits.slice(0, 2)) * 60 + Number(digits.slice(2))) * 60_000;
}

/** Wall time to instant: an hour that the clock skips is no time, one that it repeats needs a word. */
function inZone(local: number, options: FormOptions): Reading {
  const zone = options.zone!;
  const wall = Temporal.PlainDateTime.from(new Date(local).toISOString().slice(0, -1));
  const earlier = wall.toZonedDateTime(zone, { disambiguation: "earlier" });
  const later = wall.toZonedDateTime(zone, { disambiguation: "later" });
  if (earlier.epochMilliseconds === later.epochMilliseconds) {
    return { milliseconds: earlier.epochMilliseconds, form: "date-time" };
  }
  if (!earlier.toPlainDateTime().equals(wall)) {
    return { problem: `the clocks of ${zone} skip this time when daylight saving begins` };
  }
  if (options.repeatedHour === undefined) {
    return {
      problem:
        `the clocks of ${zone} show this time twice when daylight saving ends; write the offset (+01:00), or say ` +
        `repeatedHour: "earlier" or "later"`,
    };
  }
  const chosen = options.repeatedHour === "earlier" ? earlier : later;
  return { milliseconds: chosen.epochMilliseconds, form: "date-time" };
}
