import { type Column, countMissing } from "../../data/index.js";

/** What a column holds, in a few words, and its range. */
export interface ColumnSummary {
  /** `numbers`, `positive numbers`, `whole numbers`, `0 or 1`, `constant`, `yes or no`, `text, 4 values`. */
  readonly kind: string;
  readonly low?: number;
  readonly high?: number;
  readonly mean?: number;
  readonly missing: number;
}

const known = new WeakMap<Column, ColumnSummary>();

/** Looks a column through, once for all time: columns do not change. */
export function columnSummary(column: Column): ColumnSummary {
  const before = known.get(column);
  if (before) return before;
  const made = summarise(column);
  known.set(column, made);
  return made;
}

function summarise(column: Column): ColumnSummary {
  const missing = countMissing(column);
  if (column.kind === "text") {
    const values = new Set(column.values);
    values.delete(null);
    const all = missing === column.values.length;
    return {
      kind: all ? "empty" : `text, ${values.size} ${values.size === 1 ? "value" : "values"}`,
      missing,
    };
  }
  let [low, high, sum, n] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, 0, 0];
  let whole = true;
  let binary = true;
  for (const value of column.values) {
    if (Number.isNaN(value)) continue;
    n++;
    sum += value;
    if (value < low) low = value;
    if (value > high) high = value;
    if (whole && !Number.isInteger(value)) whole = false;
    if (binary && value !== 0 && value !== 1) binary = false;
  }
  if (n === 0) return { kind: "empty", missing };
  return { kind: kindOf(column, low, high, whole, binary), low, high, mean: sum / n, missing };
}

function kindOf(column: Column, low: number, high: number, whole: boolean, binary: boolean): string {
  if (low === high) return "constant";
  if (column.kind === "boolean") return "yes or no";
  if (binary) return "0 or 1";
  if (whole) return low > 0 ? "positive whole numbers" : "whole numbers";
  return low > 0 ? "positive numbers" : "numbers";
}
