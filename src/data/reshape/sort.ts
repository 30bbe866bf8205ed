import type { TimeTable } from "../table.js";
import { takeRows } from "./derive.js";

/** The rows in order of time; rows of one period keep their order. */
export function sort(table: TimeTable): TimeTable {
  const { ordinals } = table.index;
  const rows = Array.from({ length: table.T }, (_, row) => row).sort(
    (a, b) => ordinals[a]! - ordinals[b]! || a - b,
  );
  const moved = rows.filter((row, i) => row !== i).length;
  return takeRows(table, rows, `sorted by time: ${moved} rows moved`);
}
