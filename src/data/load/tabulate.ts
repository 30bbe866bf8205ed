import { InputError } from "../../numeric/index.js";
import type { Column } from "../column.js";
import { suggestion } from "../nearest.js";
import { duplicatesOf, firstUnsorted, listRows } from "../regular.js";
import type { Remark } from "../result.js";
import { TimeTable } from "../table.js";
import { periodLabel, spanText, type TimeIndex } from "../time/time-index.js";
import type { LoadOptions } from "./options.js";
import { RowProblem } from "./problem.js";
import type { RawColumn, RawTable } from "./raw-table.js";
import { readTimeColumn, wallText } from "./time-column.js";

/**
 * Makes a table of columns as they were read: the time column becomes the index, every number is checked. Throws
 * RowProblem for a row that cannot be taken, InputError for unsorted or doubled rows unless the options say what to do.
 */
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
  const { index, walls, findings } = readTimeColumn(time, options);
  const others = raw.columns.filter((column) => column !== time);
  const columns = others.map(asColumn);
  const table = new TimeTable({
    index,
    columns,
    readingFindings: [...raw.findings, ...findings, ...numbersInText(columns, options)],
    provenance: [`loaded from ${description}: ${time.values.length} rows, ${spanText(index)}`],
    source: { description, ...(raw.fingerprint ? { fingerprint: raw.fingerprint } : {}) },
  });
  return regular(table, walls, options);
}

function asColumn(column: RawColumn): Column {
  if (column.kind === "text") return column;
  if (column.kind === "instant") {
    const values = Array.from(column.values, (at) =>
      Number.isNaN(at) ? null : column.form === "date" ? wallText(at).slice(0, 10) : wallText(at),
    );
    return { name: column.name, kind: "text", values };
  }
  const { values } = column;
  for (let row = 0; row < values.length; row++) {
    if (Math.abs(values[row]!) === Number.POSITIVE_INFINITY) {
      throw new RowProblem(
        row,
        `column ${JSON.stringify(column.name)}`,
        "the number is infinite. Mend the cell, or leave it blank if it is missing.",
      );
    }
  }
  return column;
}

const plain = /^\s*[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?\s*$/i;
const withUnit = /^\s*\(?[€$£¥]?\s*[+-−]?\d[\d.,'’\s]*\s*[%€$£¥]?\)?\s*$/;

/** Texts that are written like numbers are said, not turned into numbers. */
function numbersInText(columns: readonly Column[], options: LoadOptions): Remark[] {
  return columns.flatMap((column): Remark[] => {
    if (column.kind !== "text" || options.text?.includes(column.name)) return [];
    let [present, numbers, measures] = [0, 0, 0];
    for (const text of column.values) {
      if (text === null) continue;
      present++;
      if (plain.test(text)) numbers++;
      else if (withUnit.test(text)) measures++;
    }
    if (numbers + measures === 0) return [];
    const name = JSON.stringify(column.name);
    const example = JSON.stringify(column.values.find((text) => text !== null && withUnit.test(text)));
    const text =
      numbers + measures === present
        ? `${name} is text, though every value is written like a number (${example}); make it one with .define`
        : `${name} is text; ${numbers + measures} of its ${present} values are written like numbers (${example})`;
    return [{ severity: numbers + measures === present ? "caution" : "note", text }];
  });
}

/** The table with its rows in order and one a period, as the options say; refused when they say nothing. */
function regular(table: TimeTable, walls: Float64Array, options: LoadOptions): TimeTable {
  let result = table;
  const said: string[] = [];
  const outs: string[] = [];
  const duplicates = duplicatesOf(table.index);
  const unsorted = firstUnsorted(table.index);
  if (duplicates.length > 0) {
    if (options.dedupe) result = result.dedupe(options.dedupe);
    else {
      const { rows } = duplicates[0]!;
      const others =
        duplicates.length > 1
          ? ` (and ${duplicates.length - 1} more such ${duplicates.length === 2 ? "period" : "periods"})`
          : "";
      const period = written(table.index, walls, rows[0]!);
      said.push(
        `rows ${listRows(rows)} ${rows.length === 2 ? "both" : "all"} stand for ${period}${others}` +
          `; ${identical(table, rows) ? "they agree in every column" : "they differ"}`,
      );
      outs.push('dedupe: "identical", "first", "last" or "mean" to make them one');
    }
  }
  if (unsorted >= 0) {
    if (options.sort) result = result.sort();
    else {
      const backwards = table.index.ordinals.every((at, i, all) => i === 0 || at < all[i - 1]!);
      const [before, after] = [unsorted - 1, unsorted].map((row) => written(table.index, walls, row));
      said.push(
        backwards
          ? `the rows run backwards in time, from ${before} on`
          : `the rows are not in order of time: row ${unsorted + 1} (${after}) comes after row ${unsorted} (${before})`,
      );
      outs.push("sort: true to sort them");
    }
  }
  if (said.length === 0 || options.asFound) return result;
  throw new InputError(
    `load: ${table.source?.description}: ${said.join(", and ")}. Say ${outs.join(", and ")}` +
      `${outs.length > 1 ? "," : ""} or asFound: true to see them as they are.`,
  );
}

/** The period of a row, with its date as written where the label says less. */
function written(index: TimeIndex, walls: Float64Array, row: number): string {
  const label = periodLabel(index, index.ordinals[row]!);
  const date = index.step.unit === "integer" ? label : wallText(walls[row]!).slice(0, 10);
  return label.startsWith(date) || date.endsWith("-01-01") ? label : `${label}, written ${date}`;
}

function identical(table: TimeTable, rows: readonly number[]): boolean {
  return table.columns.every(({ values }) => rows.every((row) => Object.is(values[row], values[rows[0]!])));
}
