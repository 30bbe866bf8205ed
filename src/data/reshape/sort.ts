import { firstUnsorted } from "../regular.js";
import type { TimeTable } from "../table.js";
import { takeRows } from "./derive.js";

/** The rows in order of time; rows of one period keep their order. */
export function sort(table: TimeTable): TimeTable {
  const { ordinals } = table.index;
  const rows = Int32Array.from(ordinals.keys());
  if (firstUnsorted(table.index) >= 0) rows.sort((a, b) => ordinals[a]! - ordinals[b]! || a - b);
  let moved = 0;
  for (let i = 0; i < rows.length; i++) if (rows[i] !== i) moved++;
  return takeRows(table, rows, `sorted by time: ${moved} rows moved`);
}
