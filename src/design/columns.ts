import { periodLabel, type TimeTable } from "../data/index.js";
import { InputError } from "../numeric/index.js";
import type { TermColumn } from "./term.js";
import type { Usable } from "./usable.js";

/** The values of a column in the usable rows, into `target`. Refuses an infinite one, naming the period. */
export function copyRows(table: TimeTable, column: TermColumn, usable: Usable, target: Float64Array): void {
  const { values, label } = column;
  const { rows, suspect } = usable;
  const n = rows.length;
  const start = rows[0]!;
  if (rows[n - 1]! - start === n - 1) target.set(values.subarray(start, start + n));
  else for (let i = 0; i < n; i++) target[i] = values[rows[i]!]!;
  const infinite = suspect.has(column) ? target.findIndex((value) => !Number.isFinite(value)) : -1;
  if (infinite === -1) return;
  const row = rows[infinite]!;
  const period = periodLabel(table.index, table.index.ordinals[row]!);
  throw new InputError(
    `fit: "${label}" is infinite in ${period} (row ${row + 1}). Mend the value, or leave it missing.`,
  );
}

/** Refuses a column that does not vary: one that is zero throughout, or one that repeats the intercept. */
export function refuseConstant(
  { label, whenZero = "Leave the term out, or use a longer sample." }: TermColumn,
  values: Float64Array,
  intercept: boolean,
  span: string,
): void {
  const value = values[0]!;
  if (value !== 0 && !intercept) return;
  for (let t = 1; t < values.length; t++) if (values[t] !== value) return;
  const name = JSON.stringify(label);
  if (value === 0) {
    throw new InputError(`fit: ${name} is zero in every period used (${span}). ${whenZero}`);
  }
  throw new InputError(
    `fit: ${name} is constant (${value}) over the periods used and cannot be told from the intercept. Leave it out, or say intercept: false.`,
  );
}
