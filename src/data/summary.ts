import { type Column, countFilled, isMissing } from "./column.js";
import { missingStretches, type Stretch } from "./findings.js";
import { type Bin, thin } from "./look/thin.js";
import type { TimeIndex } from "./time/time-index.js";

/** What a column holds. */
export interface ColumnSummary {
  readonly name: string;
  /**
   * In a few words: `numbers`, `positive numbers`, `whole numbers`, `positive whole numbers`, `0 or 1`, `constant`,
   * `yes or no`, `text, 4 values`, `empty`.
   */
  readonly kind: string;
  /** Range and mean of the numbers that are there; absent for text and for an empty column. */
  readonly low?: number;
  readonly high?: number;
  readonly mean?: number;
  /** Rows that are missing, and the stretches of neighbouring rows that they make up. */
  readonly missing: number;
  readonly stretches: readonly Stretch[];
  /** How many of the missing rows come before the first value, and after the last. */
  readonly leading: number;
  readonly trailing: number;
  /** Rows that were filled in and not observed. */
  readonly filled: number;
}

/** Looks a column through once. */
export function columnSummary(column: Column, index: TimeIndex): ColumnSummary {
  const T = column.values.length;
  const stretches = missingStretches(column, index);
  let [leading, trailing] = [0, 0];
  while (leading < T && isMissing(column, leading)) leading++;
  while (trailing < T - leading && isMissing(column, T - 1 - trailing)) trailing++;
  const shared = { name: column.name, stretches, leading, trailing, filled: countFilled(column) };
  return { ...shared, ...(column.kind === "text" ? ofTexts(column.values) : ofNumbers(column)) };
}

function ofTexts(values: readonly (string | null)[]): { kind: string; missing: number } {
  const distinct = new Set<string>();
  let missing = 0;
  for (const text of values) {
    if (text === null) missing++;
    else distinct.add(text);
  }
  const count = distinct.size;
  return { kind: count === 0 ? "empty" : `text, ${count} ${count === 1 ? "value" : "values"}`, missing };
}

function ofNumbers(column: Column & { values: Float64Array }): {
  kind: string;
  missing: number;
  low?: number;
  high?: number;
  mean?: number;
} {
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
  const missing = column.values.length - n;
  if (n === 0) return { kind: "empty", missing };
  const kind =
    low === high
      ? "constant"
      : column.kind === "boolean"
        ? "yes or no"
        : binary
          ? "0 or 1"
          : `${low > 0 ? "positive " : ""}${whole ? "whole " : ""}numbers`;
  return { kind, missing, low, high, mean: sum / n };
}

/** A column over the whole time axis in at most `most` stretches, for a small line; absent and missing periods are empty. */
export function smallLine(column: Column, index: TimeIndex, most = 120): Bin[] {
  if (column.kind === "text" || index.ordinals.length === 0) return [];
  let [first, last] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const ordinal of index.ordinals) {
    if (ordinal < first) first = ordinal;
    if (ordinal > last) last = ordinal;
  }
  const onAxis = new Float64Array(last - first + 1).fill(Number.NaN);
  index.ordinals.forEach((ordinal, row) => {
    onAxis[ordinal - first] = column.values[row]!;
  });
  return thin(onAxis, first, most);
}
