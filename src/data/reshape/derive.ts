import { type Column, pickNumbers, pickRows } from "../column.js";
import { type TableParts, TimeTable } from "../table.js";

/** A new table that differs from `table` in some parts, with one more line of provenance. */
export function derive(table: TimeTable, step: string, changes: Partial<TableParts>): TimeTable {
  return new TimeTable({
    index: table.index,
    columns: table.columns,
    readingFindings: table.readingFindings,
    ...(table.source ? { source: table.source } : {}),
    ...changes,
    provenance: [...table.provenance, step],
  });
}

/** The given rows (0-based) of a table, in that order. */
export function takeRows(table: TimeTable, rows: ArrayLike<number>, step: string): TimeTable {
  const ordinals = pickNumbers(table.index.ordinals, rows);
  const columns: Column[] = table.columns.map((column) => pickRows(column, rows));
  return derive(table, step, { index: { ...table.index, ordinals }, columns });
}
