import { InputError } from "../../numeric/index.js";
import { type Column, isMissing } from "../column.js";
import type { TimeTable } from "../table.js";
import { periodLabel } from "../time/time-index.js";
import { derive } from "./derive.js";

/** One row as a definition sees it: each column's value (missing: NaN or null), and `period`, its label. */
// biome-ignore lint/suspicious/noExplicitAny: a row's columns are known only at run time, and cells do arithmetic on them.
export type Row = Record<string, any> & { readonly period: string };

/** Makes one value of a new column from a row: a number, a truth value, a text, or null for missing. */
export type Definition = (row: Row, position: number) => number | boolean | string | null;

/** New columns from each row; a name already there is replaced in place. */
export function define(table: TimeTable, definitions: Readonly<Record<string, Definition>>): TimeTable {
  const rows = rowsOf(table);
  const added = Object.entries(definitions).map(([name, make]) => makeColumn(table, rows, name, make));
  const kept = table.columns.map((column) => added.find(({ name }) => name === column.name) ?? column);
  const columns = [...kept, ...added.filter(({ name }) => !table.has(name))];
  return derive(table, `defined ${Object.keys(definitions).join(", ")}`, { columns });
}

/** Rows as objects that refuse a column that is not there. */
export function rowsOf(table: TimeTable): Row[] {
  const shape = {};
  let at = 0;
  for (const column of table.columns) {
    const read =
      column.kind === "boolean"
        ? () => (Number.isNaN(column.values[at]!) ? null : column.values[at] === 1)
        : () => column.values[at];
    Object.defineProperty(shape, column.name, { get: read, enumerable: true });
  }
  if (!table.has("period")) {
    Object.defineProperty(shape, "period", {
      get: () => periodLabel(table.index, table.index.ordinals[at]!),
    });
  }
  return Array.from({ length: table.T }, (_, row) => {
    return new Proxy(shape, {
      get(target, name) {
        if (typeof name === "string" && !(name in target)) table.column(name); // throws, with the nearest name
        at = row;
        return Reflect.get(target, name);
      },
    }) as Row;
  });
}

function makeColumn(table: TimeTable, rows: readonly Row[], name: string, make: Definition): Column {
  const values = rows.map((row, position) => make(row, position));
  const first = values.find((value) => value !== null && value !== undefined);
  if (typeof first === "string") {
    return {
      name,
      kind: "text",
      values: values.map((value) => (value === null || value === undefined ? null : String(value))),
    };
  }
  const numbers = Float64Array.from(values, (value, row) => {
    if (value === null || value === undefined) return Number.NaN;
    const number = Number(value);
    const period = () => periodLabel(table.index, table.index.ordinals[row]!);
    if (typeof value === "string") {
      throw new InputError(`define: "${name}" is text in ${period()} (row ${row + 1}) but a number before.`);
    }
    if (number === Number.POSITIVE_INFINITY || number === Number.NEGATIVE_INFINITY) {
      throw new InputError(`define: "${name}" is infinite in ${period()} (row ${row + 1}).`);
    }
    return number;
  });
  const kind = typeof first === "boolean" ? "boolean" : "number";
  const missing = numbers.findIndex(
    (value, row) => Number.isNaN(value) && table.columns.every((c) => !isMissing(c, row)),
  );
  if (missing >= 0 && values[missing] !== null) {
    throw new InputError(
      `define: "${name}" is not a number in ${periodLabel(table.index, table.index.ordinals[missing]!)} (row ${missing + 1}) ` +
        "although nothing is missing there; return null where it is meant to be missing.",
    );
  }
  return { name, kind, values: numbers };
}
