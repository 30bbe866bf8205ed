import type { DedupeHow } from "../reshape/dedupe.js";
import type { Step } from "../time/step.js";

/** Options of `load`. */
export interface LoadOptions {
  /** Name of the time column. */
  readonly time: string;
  /** The step, where it should not be inferred: `"month"`, `"15 minutes"`. */
  readonly every?: string | Step;
  /** How 03/04/2024 is to be read. Such dates are refused without it. */
  readonly dates?: "day-month" | "month-day";
  /** IANA time zone of date-times written without an offset, and of labels. Default UTC. */
  readonly zone?: string;
  /**
   * Which pass of the hour that the end of daylight saving repeats is meant; `"in order"`: the first of two equal
   * times is the earlier one. Refused without it.
   */
  readonly repeatedHour?: "earlier" | "later" | "in order";
  /** Rows are sorted by time. Unsorted rows are refused without it. */
  readonly sort?: boolean;
  /** What becomes of rows of one period, as in `.dedupe`. They are refused without it. */
  readonly dedupe?: DedupeHow;
  /** Unsorted and doubled rows stay as they are and become findings, to be looked at and mended by hand. */
  readonly asFound?: boolean;
  /** Texts that stand for a missing value. Default: blank, NA, NaN, null, in the usual cases. */
  readonly missing?: readonly string[];
  /** Columns that stay text although they look like numbers. */
  readonly text?: readonly string[];
  /** Names of the columns of a delimited file that has no header line. */
  readonly names?: readonly string[];
  /** Lines of a delimited file, or rows of a workbook, to pass over before the header. Default 0. */
  readonly skip?: number;
  /** Delimiter of a delimited file; found out without it. */
  readonly delimiter?: string;
  /** The decimal sign of a delimited file; found out without it. */
  readonly decimal?: "." | ",";
  /** What stands between thousands in a delimited file; found out without it. */
  readonly thousands?: string;
  /** Sheet of a workbook, by name or number (from 1). Default the first. */
  readonly sheet?: string | number;
}

/** Texts that count as missing when nothing else is said. */
export const usualMissing: readonly string[] = ["", "NA", "N/A", "NaN", "nan", "null", "NULL", "na"];

/** Whether a text stands for a missing value; spaces around it do not count. */
export function missingTexts(options: LoadOptions): ReadonlySet<string> {
  return new Set((options.missing ?? usualMissing).map((text) => text.trim()));
}
