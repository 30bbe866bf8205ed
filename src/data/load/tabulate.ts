import { InputError } from "../../numeric/index.js";
import type { Column } from "../column.js";
import { suggestion } from "../nearest.js";
import type { Remark } from "../result.js";
import { TimeTable } from "../table.js";
import { ordinalOfInstant } from "../time/calendar.js";
import { formOf, isAmbiguous, readInstant, type WrittenForm } from "../time/forms.js";
import { inferStep, parseStep } from "../time/infer.js";
import { type Step, stepName } from "../time/step.js";
import { spanText, type TimeIndex } from "../time/time-index.js";
import type { LoadOptions } from "./options.js";
import type { RawColumn, RawTable } from "./raw-table.js";

/** Makes a table of columns as they were read: the time column becomes the index, every number is checked. */
export function tabulate(raw: RawTable, options: LoadOptions): TimeTable {
  const { description } = raw;
  const time = raw.columns.find(({ name }) => name === options.time);
  if (!time) {
    const names = raw.columns.map(({ name }) => name);
    throw new InputError(
      `load: ${description} has no time column ${JSON.stringify(options.time)}.${suggestion(options.time, names)}`,
    );
  }
  if (time.values.length === 0) throw new InputError(`load: ${description} has no rows.`);
  const { index, findings } = readTime(time, description, options);
  const columns = raw.columns
    .filter((column) => column !== time)
    .map((column) => checked(column, description));
  return new TimeTable({
    index,
    columns,
    readingFindings: [...raw.findings, ...findings],
    provenance: [`loaded from ${description}: ${time.values.length} rows, ${spanText(index)}`],
    source: { description, ...(raw.fingerprint ? { fingerprint: raw.fingerprint } : {}) },
  });
}

function checked(column: RawColumn, description: string): Column {
  if (column.kind === "text") return column;
  for (let row = 0; row < column.values.length; row++) {
    if (Math.abs(column.values[row]!) === Number.POSITIVE_INFINITY) {
      throw new InputError(
        `load: row ${row + 1} of ${description}, column ${JSON.stringify(column.name)} is infinite. Mend the cell, or leave it blank if it is missing.`,
      );
    }
  }
  return column;
}

function readTime(
  time: RawColumn,
  description: string,
  options: LoadOptions,
): { index: TimeIndex; findings: Remark[] } {
  const name = JSON.stringify(time.name);
  const at = (row: number) => `row ${row + 1} of ${description}, time column ${name}`;
  const texts = writtenPeriods(time, at);
  const first = formOf(texts[0]!, options.dates);
  if (first === undefined) {
    throw new InputError(
      `load: ${at(0)}: ${JSON.stringify(texts[0])} is no written period. Written forms: 2024, 2024H1, 2024Q3, 2024-03, ` +
        "2024-W07, 2024-03-05, 2024-03-05T14:00, whole numbers.",
    );
  }
  const form = wholeNumbers(texts, first, options) ? "integer" : first;
  const instants = new Float64Array(texts.length);
  for (let row = 0; row < texts.length; row++) {
    const text = texts[row]!;
    if (form === "integer" && /^[+-]?\d+$/.test(text)) {
      instants[row] = Number(text);
      continue;
    }
    const reading = readInstant(text, options);
    if ("problem" in reading) {
      throw new InputError(`load: ${at(row)}: ${JSON.stringify(text)}: ${reading.problem}.`);
    }
    if (reading.form !== form) {
      const hint = isAmbiguous(text) ? ", and its day and month cannot be told apart" : "";
      throw new InputError(
        `load: ${at(row)}: ${JSON.stringify(text)} is written otherwise than row 1 (${JSON.stringify(texts[0])})${hint}. ` +
          "Write all periods in one form.",
      );
    }
    instants[row] = reading.milliseconds;
  }
  const step = options.every
    ? statedStep(options.every, form, name)
    : inferredStep(instants, form, name, options);
  const ordinals = instants.map((instant) => ordinalOfInstant(step, instant));
  requireWeekdays(step, instants, texts, at);
  const findings: Remark[] = [];
  if (step.unit === "week" && form === "date") {
    findings.push({ severity: "note", text: "each date stands for the ISO week that it falls in" });
  }
  if (form === "date-time" && !options.zone && !texts.some((text) => /(Z|[+-]\d\d:?(\d\d)?)$/.test(text))) {
    findings.push({ severity: "note", text: "times carry no offset and were read as UTC" });
  }
  const zone = options.zone ? { zone: options.zone } : {};
  return { index: { step, name: time.name, ordinals, ...zone }, findings };
}

/** The time column as texts; whole numbers count as written years or counters. */
function writtenPeriods(time: RawColumn, at: (row: number) => string): string[] {
  return Array.from(time.values as ArrayLike<number | string | null>, (value, row) => {
    if (value === null || (typeof value === "number" && Number.isNaN(value)) || value === "") {
      throw new InputError(`load: ${at(row)} is blank. Every row needs a period.`);
    }
    if (typeof value === "number" && !Number.isInteger(value)) {
      throw new InputError(`load: ${at(row)}: ${value} is no whole number and no written period.`);
    }
    return String(value).trim();
  });
}

/** Four-digit numbers are years when all of them could be; anything else of digits alone counts periods. */
function wholeNumbers(texts: readonly string[], form: WrittenForm, options: LoadOptions): boolean {
  if (form !== "year" && form !== "integer") return false;
  if (options.every !== undefined) return parseStep(options.every).unit === "integer";
  if (form === "integer") return true;
  return (
    !texts.every((text) => /^(1[0-9]|2[0-9])\d\d$/.test(text)) &&
    texts.every((text) => /^[+-]?\d+$/.test(text))
  );
}

function statedStep(every: string | Step, form: WrittenForm, name: string): Step {
  const step = parseStep(every);
  if ((form === "integer") !== (step.unit === "integer")) {
    throw new InputError(
      `load: the time column ${name} is written as ${form}, which does not fit every: "${stepName(step)}".`,
    );
  }
  return step;
}

function inferredStep(instants: Float64Array, form: WrittenForm, name: string, options: LoadOptions): Step {
  const ascending = Float64Array.from(new Set(instants)).sort();
  const step = inferStep(ascending, form);
  if (step) return step;
  if (instants.length === 1 || ascending.length === 1) {
    throw new InputError(
      `load: one period does not tell the step of ${name}; state it, as in every: "month".`,
    );
  }
  void options;
  throw new InputError(`load: the step of ${name} cannot be inferred; state it, as in every: "month".`);
}

function requireWeekdays(
  step: Step,
  instants: Float64Array,
  texts: readonly string[],
  at: (row: number) => string,
): void {
  if (step.unit !== "business-day") return;
  for (let row = 0; row < instants.length; row++) {
    const weekday = new Date(instants[row]!).getUTCDay();
    if (weekday === 0 || weekday === 6) {
      throw new InputError(
        `load: ${at(row)}: ${texts[row]} is a ${weekday === 0 ? "Sunday" : "Saturday"}, no business day.`,
      );
    }
  }
}
