import { InputError } from "../../numeric/index.js";
import type { TimeTable } from "../table.js";
import { parsePeriod, parsePeriodEnd, spanText } from "../time/time-index.js";
import { takeRows } from "./derive.js";

/** The rows from one period to another, both included. */
export function between(table: TimeTable, from?: string | number, to?: string | number): TimeTable {
  const first = from === undefined ? Number.NEGATIVE_INFINITY : parsePeriod(table.index, from);
  const last = to === undefined ? Number.POSITIVE_INFINITY : parsePeriodEnd(table.index, to);
  const rows: number[] = [];
  table.index.ordinals.forEach((ordinal, row) => {
    if (ordinal >= first && ordinal <= last) rows.push(row);
  });
  if (rows.length === 0) {
    throw new InputError(
      `between: no row lies between ${from ?? "the start"} and ${to ?? "the end"}; the table spans ${spanText(table.index)}.`,
    );
  }
  const left = table.T - rows.length;
  return takeRows(
    table,
    rows,
    `between ${from ?? "the start"} and ${to ?? "the end"}: ${rows.length} rows kept, ${left} left out`,
  );
}
