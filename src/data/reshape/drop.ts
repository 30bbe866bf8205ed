import { isMissing } from "../column.js";
import type { TimeTable } from "../table.js";
import { periodLabel } from "../time/time-index.js";
import { derive, takeRows } from "./derive.js";

/** Without these columns. */
export function drop(table: TimeTable, names: readonly string[]): TimeTable {
  const unwanted = new Set(names.map((name) => table.column(name).name));
  const columns = table.columns.filter((column) => !unwanted.has(column.name));
  return derive(table, `columns dropped: ${names.join(", ")}`, { columns });
}

/** Without the rows in which any of the named columns (all, when none is named) is missing. */
export function dropMissing(table: TimeTable, names: readonly string[]): TimeTable {
  const columns = names.length > 0 ? names.map((name) => table.column(name)) : table.columns;
  const lacks = new Uint8Array(table.T);
  for (const column of columns) {
    for (let row = 0; row < table.T; row++) if (isMissing(column, row)) lacks[row] = 1;
  }
  const rows: number[] = [];
  for (let row = 0; row < table.T; row++) if (lacks[row] === 0) rows.push(row);
  const lost = table.T - rows.length;
  const label = (row: number) => periodLabel(table.index, table.index.ordinals[row]!);
  const first = lost > 0 ? `, first ${label(lacks.indexOf(1))}` : "";
  return takeRows(table, rows, `rows with a missing value dropped: ${lost}${first}`);
}
