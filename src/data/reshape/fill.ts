import { InputError } from "../../numeric/index.js";
import { type Column, isMissing, type NumberColumn } from "../column.js";
import { requireRegular } from "../regular.js";
import type { TimeTable } from "../table.js";
import { seasonLength, stepName } from "../time/step.js";
import { periodLabel, seasonOf } from "../time/time-index.js";
import { derive } from "./derive.js";

/**
 * How a missing value is filled: with the value before it, on the straight line between its neighbours in time, with
 * the mean of the same season (numbers only), or with a value of your own.
 */
export type FillHow = "previous" | "linear" | "seasonal" | number | { readonly value: string | number };

/**
 * Fills the missing values of a column. Periods that no row stands for become rows first, so that a gap is filled
 * too; the other columns are missing there. What cannot be filled (before the first value, say) stays missing.
 */
export function fill(table: TimeTable, name: string, how: FillHow): TimeTable {
  requireRegular(table.index, "fill");
  const wanted = table.column(name);
  const complete = withGapsAsRows(table);
  const column = complete.columns.find((other) => other.name === wanted.name)!;
  const values = fillColumn(complete, column, how);
  const filled = Uint8Array.from({ length: complete.T }, (_, row) =>
    column.filled?.[row] || (isMissing(column, row) && !isMissing(values, row)) ? 1 : 0,
  );
  const count =
    filled.reduce((sum, flag) => sum + flag, 0) - (column.filled?.reduce((sum, flag) => sum + flag, 0) ?? 0);
  const columns = complete.columns.map((other) => (other === column ? { ...values, filled } : other));
  const added = complete.T - table.T;
  const way =
    typeof how === "object" ? `with ${how.value}` : typeof how === "number" ? `with ${how}` : `by ${how}`;
  const rows = added > 0 ? `; ${added} absent periods became rows` : "";
  return derive(table, `filled ${name} ${way}: ${count} values${rows}`, { index: complete.index, columns });
}

/** A table with one row for every period of its span; new rows are missing in every column. */
function withGapsAsRows(table: TimeTable): Pick<TimeTable, "index" | "columns" | "T"> {
  const { ordinals } = table.index;
  const first = ordinals[0]!;
  const T = ordinals[ordinals.length - 1]! - first + 1;
  if (T === table.T) return table;
  const all = Float64Array.from({ length: T }, (_, i) => first + i);
  const columns = table.columns.map((column): Column => {
    const filled = column.filled ? new Uint8Array(T) : undefined;
    ordinals.forEach((ordinal, row) => {
      if (filled) filled[ordinal - first] = column.filled![row]!;
    });
    const flags = filled ? { filled } : {};
    if (column.kind === "text") {
      const values = new Array<string | null>(T).fill(null);
      ordinals.forEach((ordinal, row) => {
        values[ordinal - first] = column.values[row]!;
      });
      return { name: column.name, kind: "text", values, ...flags };
    }
    const values = new Float64Array(T).fill(Number.NaN);
    ordinals.forEach((ordinal, row) => {
      values[ordinal - first] = column.values[row]!;
    });
    return { name: column.name, kind: column.kind, values, ...flags };
  });
  return { index: { ...table.index, ordinals: all }, columns, T };
}

function fillColumn(table: Pick<TimeTable, "index">, column: Column, how: FillHow): Column {
  const value = typeof how === "object" ? how.value : typeof how === "number" ? how : undefined;
  if (column.kind === "text") {
    if (value === undefined && how !== "previous") {
      throw new InputError(`fill: "${column.name}" holds text; fill it with "previous" or { value: "..." }.`);
    }
    let last: string | null = null;
    const values = column.values.map((text) => {
      if (text !== null) last = text;
      return text ?? (value === undefined ? last : String(value));
    });
    return { ...column, values };
  }
  if (value !== undefined) {
    if (typeof value !== "number" || !Number.isFinite(value)) {
      throw new InputError(
        `fill: "${column.name}" holds numbers and cannot be filled with ${JSON.stringify(value)}.`,
      );
    }
    return { ...column, values: column.values.map((x) => (Number.isNaN(x) ? value : x)) };
  }
  if (how === "previous") return { ...column, values: previous(column) };
  if (how === "linear") return { ...column, values: linear(column) };
  if (how === "seasonal") return { ...column, values: seasonal(table, column) };
  throw new InputError(
    `fill: ${JSON.stringify(how)} is no way to fill. There are "previous", "linear", "seasonal", a number, or { value }.`,
  );
}

function previous(column: NumberColumn): Float64Array {
  let last = Number.NaN;
  return column.values.map((x) => {
    if (!Number.isNaN(x)) last = x;
    return last;
  });
}

function linear(column: NumberColumn): Float64Array {
  const values = Float64Array.from(column.values);
  let before = -1;
  for (let i = 0; i < values.length; i++) {
    if (Number.isNaN(column.values[i]!)) continue;
    if (before >= 0) {
      const a = column.values[before]!;
      const b = column.values[i]!;
      for (let m = before + 1; m < i; m++) values[m] = a + ((b - a) * (m - before)) / (i - before);
    }
    before = i;
  }
  return values;
}

function seasonal(table: Pick<TimeTable, "index">, column: NumberColumn): Float64Array {
  const { step, ordinals } = table.index;
  const length = seasonLength(step);
  if (length === undefined) {
    throw new InputError(`fill: steps of one ${stepName(step)} have no season; use "linear" or "previous".`);
  }
  const sums = new Float64Array(length);
  const counts = new Float64Array(length);
  column.values.forEach((x, i) => {
    if (Number.isNaN(x)) return;
    const season = seasonOf(step, ordinals[i]!, table.index.zone);
    sums[season]! += x;
    counts[season]! += 1;
  });
  return column.values.map((x, i) => {
    if (!Number.isNaN(x)) return x;
    const season = seasonOf(step, ordinals[i]!, table.index.zone);
    if (counts[season] === 0) {
      throw new InputError(
        `fill: "${column.name}" has no value in any period of the season of ${periodLabel(table.index, ordinals[i]!)}.`,
      );
    }
    return sums[season]! / counts[season]!;
  });
}
