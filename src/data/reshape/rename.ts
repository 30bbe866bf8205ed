import { InputError } from "../../numeric/index.js";
import type { TimeTable } from "../table.js";
import { derive } from "./derive.js";

/** Other names for columns, given as old name to new name. */
export function rename(table: TimeTable, names: Readonly<Record<string, string>>): TimeTable {
  for (const old of Object.keys(names)) table.column(old);
  const columns = table.columns.map((column) => ({ ...column, name: names[column.name] ?? column.name }));
  const twice = columns.find((column, i) => columns.findIndex((other) => other.name === column.name) !== i);
  if (twice) throw new InputError(`rename: two columns would be called ${JSON.stringify(twice.name)}.`);
  const list = Object.entries(names).map(([old, name]) => `${old} to ${name}`);
  return derive(table, `renamed ${list.join(", ")}`, { columns });
}
