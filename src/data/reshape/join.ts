import { InputError } from "../../numeric/index.js";
import type { Column } from "../column.js";
import { requireRegular } from "../regular.js";
import type { TimeTable } from "../table.js";
import { coarsePeriodOf, meanLength } from "../time/nesting.js";
import { stepName } from "../time/step.js";
import { spanText } from "../time/time-index.js";
import { derive, takeRows } from "./derive.js";

/** Options of `join`. */
export interface JoinOptions {
  /**
   * What becomes of rows of this table that the other has no period for: `"keep"` leaves its columns missing there,
   * `"cut"` drops the rows. Refused without it when there are any.
   */
  readonly overhang?: "keep" | "cut";
}

/**
 * The columns of `other` beside those of `table`, matched by period. A coarser `other` gives each fine period the
 * value of the coarse one that holds it.
 */
export function join(table: TimeTable, other: TimeTable, options: JoinOptions = {}): TimeTable {
  requireRegular(table.index, "join");
  requireRegular(other.index, "join");
  const twice = other.names.find((name) => table.has(name));
  if (twice) {
    throw new InputError(
      `join: both tables have a column ${JSON.stringify(twice)}; rename one with .rename({ ... }).`,
    );
  }
  const integers = [table, other].filter(({ index }) => index.step.unit === "integer").length;
  if (integers === 1 || (integers === 0 && meanLength(other.index.step) < meanLength(table.index.step))) {
    throw new InputError(
      `join: the other table's step (${stepName(other.index.step)}) is finer than, or of another kind from, this ` +
        `table's (${stepName(table.index.step)}); bring it to one step first with .to("${stepName(table.index.step)}", { ... }).`,
    );
  }
  const matches = matchesOf(table, other);
  const unmatched = matches.reduce((count, row) => count + (row < 0 ? 1 : 0), 0);
  if (unmatched === table.T) {
    throw new InputError(`join: no period in common (${spanText(table.index)}; ${spanText(other.index)}).`);
  }
  if (unmatched > 0 && options.overhang === undefined) {
    throw new InputError(
      `join: ${unmatched} of ${table.T} rows have no period in the other table (${spanText(other.index)}). ` +
        `Say { overhang: "keep" } to leave its columns missing there, or { overhang: "cut" } to drop the rows.`,
    );
  }
  const joined = derive(table, `joined ${other.names.join(", ")} (${stepName(other.index.step)})`, {
    columns: [...table.columns, ...other.columns.map((column) => spread(column, matches))],
  });
  if (unmatched === 0 || options.overhang !== "cut") return joined;
  const rows = Array.from(matches.keys()).filter((row) => matches[row]! >= 0);
  return takeRows(joined, rows, `rows without a match cut: ${unmatched}`);
}

/** For each row of `table` the row of `other` whose period holds it, or −1. Both are in order, so one walk finds all. */
function matchesOf(table: TimeTable, other: TimeTable): Int32Array {
  const matches = new Int32Array(table.T).fill(-1);
  const { ordinals, step } = other.index;
  let at = 0;
  table.index.ordinals.forEach((ordinal, row) => {
    const wanted = coarsePeriodOf(table.index, step, ordinal);
    if (wanted === undefined) return;
    while (at < ordinals.length && ordinals[at]! < wanted) at++;
    if (ordinals[at] === wanted) matches[row] = at;
  });
  return matches;
}

function spread(column: Column, matches: Int32Array): Column {
  const flags = column.filled
    ? { filled: Uint8Array.from(matches, (row) => (row < 0 ? 0 : column.filled![row]!)) }
    : {};
  if (column.kind === "text") {
    return {
      name: column.name,
      kind: "text",
      values: Array.from(matches, (row) => (row < 0 ? null : column.values[row]!)),
      ...flags,
    };
  }
  const values = Float64Array.from(matches, (row) => (row < 0 ? Number.NaN : column.values[row]!));
  return { name: column.name, kind: column.kind, values, ...flags };
}
