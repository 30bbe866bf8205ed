import { InputError } from "../../numeric/index.js";
import { type Column, pickRows } from "../column.js";
import { duplicatesOf } from "../regular.js";
import type { TimeTable } from "../table.js";
import { periodLabel } from "../time/time-index.js";
import { derive } from "./derive.js";

/** Which of the rows of one period stands: `identical` demands that they agree in every column. */
export type DedupeHow = "identical" | "first" | "last" | "mean";

/** Rows of one period made one, in the place of the first of them. */
export function dedupe(table: TimeTable, how: DedupeHow): TimeTable {
  if (!["identical", "first", "last", "mean"].includes(how)) {
    throw new InputError(`dedupe: ${JSON.stringify(how)} is none of "identical", "first", "last", "mean".`);
  }
  const duplicates = duplicatesOf(table.index);
  const chosen = new Map<number, number>(); // row that stays → row whose values it takes
  const removed = new Set<number>();
  for (const { ordinal, rows } of duplicates) {
    if (how === "identical") requireIdentical(table, ordinal, rows);
    chosen.set(rows[0]!, how === "last" ? rows[rows.length - 1]! : rows[0]!);
    for (const row of rows.slice(1)) removed.add(row);
  }
  const kept = Array.from({ length: table.T }, (_, row) => row).filter((row) => !removed.has(row));
  const sources = kept.map((row) => chosen.get(row) ?? row);
  let columns: Column[] = table.columns.map((column) => pickRows(column, sources));
  if (how === "mean")
    columns = columns.map((column, c) => meanColumn(table.columns[c]!, column, kept, duplicates));
  const ordinals = Float64Array.from(kept, (row) => table.index.ordinals[row]!);
  const step = `rows of one period made one (${how}): ${removed.size} rows removed in ${duplicates.length} periods`;
  return derive(table, step, { index: { ...table.index, ordinals }, columns });
}

function requireIdentical(table: TimeTable, ordinal: number, rows: readonly number[]): void {
  for (const column of table.columns) {
    const differs = rows.find((row) => !Object.is(column.values[row], column.values[rows[0]!]));
    if (differs === undefined) continue;
    throw new InputError(
      `dedupe: rows ${rows[0]! + 1} and ${differs + 1}, both ${periodLabel(table.index, ordinal)}, differ in ` +
        `${JSON.stringify(column.name)} (${column.values[rows[0]!]} and ${column.values[differs]}). ` +
        `Say which stands: "first", "last" or "mean".`,
    );
  }
}

function meanColumn(
  source: Column,
  target: Column,
  kept: readonly number[],
  duplicates: readonly { rows: number[] }[],
): Column {
  if (target.kind === "text" || source.kind === "text") return target;
  const values = Float64Array.from(target.values);
  const place = new Map(kept.map((row, i) => [row, i]));
  for (const { rows } of duplicates) {
    values[place.get(rows[0]!)!] = rows.reduce((sum, row) => sum + source.values[row]!, 0) / rows.length;
  }
  return { ...target, kind: "number", values };
}
