import {
  countedSteps,
  parsePeriod,
  parsePeriodEnd,
  periodLabel,
  type Remark,
  requireRegular,
  spanText,
  type TimeIndex,
  type TimeTable,
} from "../data/index.js";
import { InputError, type Matrix, matrix } from "../numeric/index.js";
import { columnsOf, flatten } from "./resolve.js";
import type { TermColumn, TermLike } from "./term.js";

/** Options of a design. */
export interface DesignOptions {
  /** First and last period used; either may be null. Default: all periods. */
  readonly sample?: readonly [from: string | number | null, to: string | number | null];
  /** Whether a constant is among the columns. Default true. */
  readonly intercept?: boolean;
  /** `"leave out"`: periods with a missing value inside the sample are left out and counted. Refused without it. */
  readonly missing?: "leave out";
}

/** The outcome and the columns that are to explain it, over the periods that can be used. T rows, k columns. */
export interface Design {
  readonly outcome: string;
  /** Length T. */
  readonly y: Float64Array;
  /** T×k, the intercept (if any) first. */
  readonly X: Matrix;
  /** Labels of the k columns. */
  readonly terms: readonly string[];
  /** Position of the intercept, −1 without one. */
  readonly interceptAt: number;
  /** Ordinals of the T periods used, on the axis of `index`. */
  readonly periods: Float64Array;
  readonly index: TimeIndex;
  /** Whether a lag of the outcome is among the terms. */
  readonly laggedOutcome: boolean;
  /** Periods of the sample that are not used, and why. */
  readonly left: readonly { readonly ordinal: number; readonly reason: string }[];
  /** Values used that were filled in and not observed. */
  readonly filled: number;
  readonly remarks: readonly Remark[];
}

/** The label of the constant. */
export const interceptLabel = "intercept";

/**
 * The regression of `outcome` on `terms` as numbers. Periods before a lag or after a lead can be formed fall out and
 * are stated; a value missing inside the sample is refused unless `missing: "leave out"`. Throws InputError naming
 * the column and period of whatever is wrong.
 */
export function design(
  table: TimeTable,
  outcome: TermLike,
  terms: TermLike | readonly TermLike[],
  options: DesignOptions = {},
): Design {
  requireRegular(table.index, "fit");
  const left = outcomeColumn(table, outcome);
  const right = flatten(terms).flatMap((term) => columnsOf(term, table));
  const intercept = options.intercept ?? true;
  checkNames(left, right, intercept);
  if (right.length === 0 && !intercept) throw new InputError("fit: there are no terms and no intercept.");
  const inSample = sampleRows(table, options.sample);
  const { rows, lost } = usableRows(table, [left, ...right], inSample, options);
  const T = rows.length;
  const k = right.length + (intercept ? 1 : 0);
  if (T <= k) {
    throw new InputError(
      `fit: ${T} ${T === 1 ? "period" : "periods"} for ${k} ${k === 1 ? "coefficient" : "coefficients"}. A fit needs more periods than coefficients: use fewer terms or a longer sample.`,
    );
  }
  const X = matrix(T, k);
  if (intercept) X.data.fill(1, 0, T);
  const shift = intercept ? 1 : 0;
  right.forEach((column, j) => {
    const target = X.data.subarray((j + shift) * T, (j + shift + 1) * T);
    copyChecked(table, column, rows, target);
  });
  const y = new Float64Array(T);
  copyChecked(table, left, rows, y);
  const filled = countFilledIn(table, [left, ...right], rows);
  return {
    outcome: left.label,
    y,
    X,
    terms: [...(intercept ? [interceptLabel] : []), ...right.map(({ label }) => label)],
    interceptAt: intercept ? 0 : -1,
    periods: Float64Array.from(rows, (row) => table.index.ordinals[row]!),
    index: table.index,
    laggedOutcome: right.some(
      (column) => column.past && column.uses.some((name) => left.uses.includes(name)),
    ),
    left: lost,
    filled,
    remarks: remarksOn(table, rows, lost, filled, right),
  };
}

function outcomeColumn(table: TimeTable, outcome: TermLike): TermColumn {
  const columns = columnsOf(outcome, table);
  if (columns.length !== 1)
    throw new InputError(`fit: the outcome must be one series, not ${columns.length}.`);
  return columns[0]!;
}

function checkNames(left: TermColumn, right: readonly TermColumn[], intercept: boolean): void {
  const seen = new Set<string>();
  for (const { label } of right) {
    if (label === left.label)
      throw new InputError(`fit: the outcome ${JSON.stringify(label)} is also among the terms.`);
    if (intercept && label === interceptLabel) {
      throw new InputError(
        `fit: a column called "intercept" would clash with the fit's own; rename it, or say intercept: false.`,
      );
    }
    if (seen.has(label)) throw new InputError(`fit: the term ${JSON.stringify(label)} is given twice.`);
    seen.add(label);
  }
}

function sampleRows(table: TimeTable, sample: DesignOptions["sample"]): number[] {
  const { ordinals } = table.index;
  const [from, to] = sample ?? [null, null];
  const first = from === null ? Number.NEGATIVE_INFINITY : parsePeriod(table.index, from);
  const last = to === null ? Number.POSITIVE_INFINITY : parsePeriodEnd(table.index, to);
  const rows: number[] = [];
  for (let row = 0; row < table.T; row++)
    if (ordinals[row]! >= first && ordinals[row]! <= last) rows.push(row);
  if (rows.length > 0) return rows;
  throw new InputError(
    `fit: no period lies in the sample ${from ?? "start"} to ${to ?? "end"}; the table spans ${spanText(table.index)}.`,
  );
}

function usableRows(
  table: TimeTable,
  columns: readonly TermColumn[],
  inSample: readonly number[],
  options: DesignOptions,
): { rows: Int32Array; lost: Design["left"] } {
  const rows: number[] = [];
  const lost: { ordinal: number; reason: string }[] = [];
  const inside = new Map<string, number[]>();
  for (const row of inSample) {
    let reason = "";
    for (const column of columns) {
      if (!Number.isNaN(column.values[row]!)) continue;
      if (column.edge?.[row]) reason ||= `${column.label} reaches beyond the table`;
      else {
        reason = `${column.label} is missing`;
        const list = inside.get(column.label);
        if (list) list.push(row);
        else inside.set(column.label, [row]);
      }
    }
    if (reason) lost.push({ ordinal: table.index.ordinals[row]!, reason });
    else rows.push(row);
  }
  if (inside.size > 0 && options.missing !== "leave out")
    refuseMissing(table, inside, inSample.length, columns);
  return { rows: Int32Array.from(rows), lost };
}

function refuseMissing(
  table: TimeTable,
  inside: ReadonlyMap<string, readonly number[]>,
  periods: number,
  columns: readonly TermColumn[],
): never {
  const parts = [...inside].map(([label, rows]) => {
    const shown = rows
      .slice(0, 3)
      .map((row) => `${periodLabel(table.index, table.index.ordinals[row]!)}, row ${row + 1}`);
    return `"${label}" is missing in ${rows.length} of ${periods} periods (${rows.length > 3 ? "first " : ""}${shown.join("; ")})`;
  });
  const names = [...new Set(columns.filter(({ label }) => inside.has(label)).flatMap(({ uses }) => uses))];
  const name = names[0] ?? [...inside.keys()][0]!;
  throw new InputError(
    `fit: ${parts.join("; ")}. Leave these periods out with missing: "leave out", or fill them first with ` +
      `.fill(${JSON.stringify(name)}, "linear").`,
  );
}

function copyChecked(table: TimeTable, column: TermColumn, rows: Int32Array, target: Float64Array): void {
  for (let i = 0; i < rows.length; i++) {
    const value = column.values[rows[i]!]!;
    if (value === Number.POSITIVE_INFINITY || value === Number.NEGATIVE_INFINITY) {
      const row = rows[i]!;
      throw new InputError(
        `fit: "${column.label}" is infinite in ${periodLabel(table.index, table.index.ordinals[row]!)} (row ${row + 1}). Mend it or leave it missing.`,
      );
    }
    target[i] = value;
  }
}

function countFilledIn(table: TimeTable, columns: readonly TermColumn[], rows: Int32Array): number {
  const names = new Set(columns.flatMap(({ uses }) => uses));
  let count = 0;
  for (const name of names) {
    const { filled } = table.column(name);
    if (filled) for (const row of rows) count += filled[row]!;
  }
  return count;
}

function remarksOn(
  table: TimeTable,
  rows: Int32Array,
  lost: Design["left"],
  filled: number,
  right: readonly TermColumn[],
): Remark[] {
  const remarks: Remark[] = [];
  const reasons = new Map<string, number>();
  for (const { reason } of lost) reasons.set(reason, (reasons.get(reason) ?? 0) + 1);
  for (const [reason, count] of reasons) {
    const severity = reason.endsWith("is missing") ? "caution" : "note";
    remarks.push({ severity, text: `${countedSteps(count, table.index.step)} left out: ${reason}` });
  }
  const { ordinals } = table.index;
  const span = ordinals[rows[rows.length - 1]!]! - ordinals[rows[0]!]! + 1;
  const absent = span - rows.length;
  if (absent > 0) {
    remarks.push({
      severity: "caution",
      text: `${countedSteps(absent, table.index.step)} inside the sample ${absent === 1 ? "is" : "are"} not used; lagged products are taken in time, never across the gap`,
    });
  }
  if (filled > 0)
    remarks.push({ severity: "caution", text: `${filled} of the values used were filled in, not observed` });
  for (const note of new Set(right.flatMap((column) => (column.note ? [column.note] : [])))) {
    remarks.push({ severity: "note", text: note });
  }
  return remarks;
}
