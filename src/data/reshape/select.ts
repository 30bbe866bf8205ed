import type { TimeTable } from "../table.js";
import { derive } from "./derive.js";

/** Only these columns, in this order. */
export function select(table: TimeTable, names: readonly string[]): TimeTable {
  const columns = [...new Set(names)].map((name) => table.column(name));
  return derive(table, `columns kept: ${names.join(", ")}`, { columns });
}
