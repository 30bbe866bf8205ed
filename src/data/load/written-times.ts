import { formOf, isAmbiguous, readInstant, type WrittenForm } from "../time/forms.js";
import { parseStep } from "../time/infer.js";
import { zoneClock } from "../time/zone.js";
import type { LoadOptions } from "./options.js";
import { RowProblem } from "./problem.js";
import type { RawColumn } from "./raw-table.js";
import { onZone, type Times } from "./time-column.js";

/** Reads a time column of whole numbers, or of texts that are all written in the form of the first. */
export function readWrittenTimes(time: Exclude<RawColumn, { kind: "instant" }>, options: LoadOptions): Times {
  const where = `time column ${JSON.stringify(time.name)}`;
  if (time.kind === "number") return wholeTimes(time.values, where, options);
  const texts = writtenPeriods(time.values, where);
  const first = formOf(texts[0]!, options.dates);
  if (first === undefined) {
    throw new RowProblem(
      0,
      where,
      `${JSON.stringify(texts[0])} is no written period. Written forms: 2024, 2024H1, 2024Q3, 2024-03, 2024-W07, ` +
        "2024-03-05, 2024-03-05T14:00, whole numbers.",
    );
  }
  if (wholeNumbers(texts, first, options)) return counters(texts, where);
  const offset = hasOffset(texts[0]!, first);
  const instants = new Float64Array(texts.length);
  const walls = new Float64Array(texts.length);
  texts.forEach((text, row) => {
    const said = JSON.stringify(text);
    const form = formOf(text, options.dates);
    if (form !== undefined && (form !== first || hasOffset(text, form) !== offset)) {
      const hint = isAmbiguous(text) ? ", and its day and month cannot be told apart" : "";
      const other = form === first ? (offset ? " without an offset" : " with an offset") : "";
      throw new RowProblem(
        row,
        where,
        `${said} is written otherwise${other} than row 1 (${JSON.stringify(texts[0])})${hint}. Write all periods in one form.`,
      );
    }
    // The zone is applied to the whole column afterwards, since a repeated hour is told apart by its neighbours.
    const reading = readInstant(text, options.dates ? { dates: options.dates } : {});
    if ("problem" in reading) throw new RowProblem(row, where, `${said}: ${reading.problem}.`);
    instants[row] = reading.milliseconds;
    walls[row] = reading.wall;
  });
  if (first !== "date-time") return { form: first, instants, walls, offset: false };
  if (!offset) return { form: first, ...onZone(walls, where, options), offset };
  if (!options.zone) return { form: first, instants, walls, offset };
  const clock = zoneClock(options.zone);
  return { form: first, instants, walls: instants.map((at) => clock.wallOf(at)), offset };
}

/** Whole numbers held as such: years when all of them could be, counters otherwise. */
function wholeTimes(values: Float64Array, where: string, options: LoadOptions): Times {
  let couldBeYears = options.every === undefined || parseStep(options.every).unit !== "integer";
  for (let row = 0; row < values.length; row++) {
    const value = values[row]!;
    if (Number.isNaN(value)) throw new RowProblem(row, where, "it is blank. Every row needs a period.");
    if (!Number.isSafeInteger(value)) {
      throw new RowProblem(row, where, `${value} is no whole number and no written period.`);
    }
    if (value < 1000 || value > 2999) couldBeYears = false;
  }
  if (!couldBeYears) return { form: "integer", instants: values, walls: values, offset: false };
  const starts = values.map((year) => Date.UTC(year, 0, 1));
  return { form: "year", instants: starts, walls: starts, offset: false };
}

function hasOffset(text: string, form: WrittenForm): boolean {
  return form === "date-time" && /(Z|[+-]\d\d:?(\d\d)?)$/.test(text.slice(11));
}

function writtenPeriods(values: ArrayLike<number | string | null>, where: string): string[] {
  return Array.from(values, (value, row) => {
    if (value === null || String(value).trim() === "") {
      throw new RowProblem(row, where, "it is blank. Every row needs a period.");
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

function counters(texts: readonly string[], where: string): Times {
  const values = Float64Array.from(texts, (text, row) => {
    if (/^[+-]?\d+$/.test(text) && Number.isSafeInteger(Number(text))) return Number(text);
    throw new RowProblem(
      row,
      where,
      `${JSON.stringify(text)} is written otherwise than row 1 (${JSON.stringify(texts[0])}). Write all periods in one form.`,
    );
  });
  return { form: "integer", instants: values, walls: values, offset: false };
}
