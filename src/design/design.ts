import { type Remark, requireRegular, spanText, type TimeIndex, type TimeTable } from "../data/index.js";
import { InputError, type Matrix, matrix } from "../numeric/index.js";
import { copyRows, refuseConstant } from "./columns.js";
import { checkNames, interceptLabel } from "./names.js";
import { designRemarks } from "./remarks.js";
import { columnsOf, requireOptions } from "./resolve.js";
import { type Sample, sampleRows } from "./sample.js";
import type { TermColumn, TermLike } from "./term.js";
import { type LeftOut, type Usable, usableRows } from "./usable.js";

/** Options of a design. */
export interface DesignOptions {
  /** First and last period used, both included; either may be null. Lags reach back before it. Default: all periods. */
  readonly sample?: Sample;
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
  /** Whether an earlier value of the outcome is among the terms. */
  readonly laggedOutcome: boolean;
  /** Periods of the sample that are not used, and why. */
  readonly left: readonly LeftOut[];
  /** Periods used that rest on values that were filled in and not observed. */
  readonly filled: number;
  readonly remarks: readonly Remark[];
}

/** Names of the options of a design. */
export const designOptionNames = ["sample", "intercept", "missing"] as const;

/**
 * The regression of `outcome` on `terms` as numbers. Periods before a lag or after a lead can be formed fall out and
 * are stated; a value missing inside the sample is refused unless `missing: "leave out"`. Throws InputError naming
 * the column and period of whatever is wrong: an unknown or doubled name, text, a missing or infinite value, a column
 * that does not vary, no more periods than coefficients.
 */
export function design(
  table: TimeTable,
  outcome: TermLike,
  terms: TermLike | readonly TermLike[],
  options: DesignOptions = {},
): Design {
  requireOptions("fit", options, designOptionNames);
  const { intercept = true, missing } = options;
  if (typeof intercept !== "boolean")
    throw new InputError(`fit: intercept is true or false, not ${JSON.stringify(intercept)}.`);
  if (missing !== undefined && missing !== "leave out")
    throw new InputError(`fit: missing can only be "leave out", not ${JSON.stringify(missing)}.`);
  requireRegular(table.index, "fit");
  const left = forFit(() => columnsOf(outcome, table));
  const right = forFit(() => columnsOf(terms, table));
  checkNames(left, right, intercept);
  const [y] = left as [TermColumn];
  const columns = [y, ...right];
  const usable = usableRows(table, columns, sampleRows(table, options.sample), missing === "leave out");
  const { rows } = usable;
  const k = right.length + (intercept ? 1 : 0);
  requireRows(rows.length, k, usable.left);
  const periods = new Float64Array(rows.length);
  copyOrdinals(table.index.ordinals, rows, periods);
  const filled = countFilled(columns, rows);
  return {
    outcome: y.label,
    ...numbers(table, y, right, usable, intercept, spanText({ ...table.index, ordinals: periods })),
    terms: [...(intercept ? [interceptLabel] : []), ...right.map(({ label }) => label)],
    interceptAt: intercept ? 0 : -1,
    periods,
    index: table.index,
    laggedOutcome: right.some((column) => holdsPast(column, y)),
    left: usable.left,
    filled,
    remarks: designRemarks(table, columns, rows, usable.left, filled),
  };
}

// What a term refuses on its own says which term; what the table refuses does not say that a fit asked.
function forFit<T>(make: () => T): T {
  try {
    return make();
  } catch (error) {
    if (error instanceof InputError && !/^[\w Δ]+: /.test(error.message))
      throw new InputError(`fit: ${error.message}`);
    throw error;
  }
}

function requireRows(T: number, k: number, left: readonly LeftOut[]): void {
  if (T > k) return;
  const why =
    left.length > 0 ? ` (${left.length} left out: ${left[0]!.reason}${left.length > 1 ? ", ..." : ""})` : "";
  throw new InputError(
    `fit: ${T} ${T === 1 ? "period" : "periods"}${why} for ${k} ${k === 1 ? "coefficient" : "coefficients"}. A fit needs more periods than coefficients: use fewer terms or a longer sample.`,
  );
}

function numbers(
  table: TimeTable,
  y: TermColumn,
  right: readonly TermColumn[],
  usable: Usable,
  intercept: boolean,
  span: string,
): { y: Float64Array; X: Matrix } {
  const T = usable.rows.length;
  const shift = intercept ? 1 : 0;
  const X = matrix(T, right.length + shift);
  if (intercept) X.data.fill(1, 0, T);
  const outcome = new Float64Array(T);
  copyRows(table, y, usable, outcome);
  right.forEach((column, j) => {
    const target = X.data.subarray((j + shift) * T, (j + shift + 1) * T);
    copyRows(table, column, usable, target);
    refuseConstant(column, target, intercept, span);
  });
  return { y: outcome, X };
}

function copyOrdinals(ordinals: Float64Array, rows: Int32Array, target: Float64Array): void {
  for (let i = 0; i < rows.length; i++) target[i] = ordinals[rows[i]!]!;
}

function countFilled(columns: readonly TermColumn[], rows: Int32Array): number {
  const marked = columns.flatMap(({ filled }) => (filled ? [filled] : []));
  if (marked.length === 0) return 0;
  let count = 0;
  for (const row of rows) if (marked.some((flags) => flags[row] === 1)) count++;
  return count;
}

// Later than the newest value that the outcome itself is made of would not be its past.
function holdsPast(term: TermColumn, outcome: TermColumn): boolean {
  return term.uses.some((use) =>
    outcome.uses.some(({ column, newest }) => column === use.column && use.oldest > newest),
  );
}
