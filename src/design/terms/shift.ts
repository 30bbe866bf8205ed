import { requireRegular } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { columnsOf, labelOf } from "../resolve.js";
import { makeTerm, type Term, type TermColumn, type TermLike } from "../term.js";

const minus = "\u2212";

/** A label moved by `by` steps: `fare (t−1)`, and `fare (t−3)` when that is moved by two more. */
export function shiftedLabel(label: string, by: number): string {
  const match = /^(.*) \(t([\u2212+])(\d+)\)$/.exec(label);
  const before = match ? (match[2] === "+" ? 1 : -1) * Number(match[3]) : 0;
  const base = match ? match[1]! : label;
  const total = before - by;
  if (total === 0) return base;
  return `${base} (t${total < 0 ? minus : "+"}${Math.abs(total)})`;
}

function shift(term: TermLike, by: number, asked: string): Term {
  return makeTerm(shiftedLabel(labelOf(term), by), (table) => {
    requireRegular(table.index, asked);
    const { ordinals } = table.index;
    const place = rowByOrdinal(ordinals);
    return columnsOf(term, table).map((column): TermColumn => {
      const values = new Float64Array(table.T).fill(Number.NaN);
      const edge = new Uint8Array(table.T);
      for (let row = 0; row < table.T; row++) {
        const source = place(ordinals[row]! - by);
        if (source >= 0) {
          values[row] = column.values[source]!;
          if (column.edge?.[source]) edge[row] = 1;
        } else if (source === -1) edge[row] = 1;
      }
      const past = by > 0 || (column.past === true && by >= 0);
      return {
        label: shiftedLabel(column.label, by),
        values,
        edge,
        uses: column.uses,
        ...(past ? { past } : {}),
      };
    });
  });
}

/** The row of a period: −1 outside the table's span, −2 in a gap. */
export function rowByOrdinal(ordinals: Float64Array): (ordinal: number) => number {
  const first = ordinals[0]!;
  const last = ordinals[ordinals.length - 1]!;
  if (last - first === ordinals.length - 1) {
    return (ordinal) => (ordinal < first || ordinal > last ? -1 : ordinal - first);
  }
  const rows = new Map(Array.from(ordinals, (ordinal, row) => [ordinal, row]));
  return (ordinal) => rows.get(ordinal) ?? (ordinal < first || ordinal > last ? -1 : -2);
}

function wholeSteps(steps: number, asked: string): void {
  if (!Number.isInteger(steps) || steps < 0) {
    throw new InputError(`${asked}: the number of steps must be a whole number from 0 up, not ${steps}.`);
  }
}

/** The term `steps` periods earlier (default 1), in time and not in rows: across a gap it is missing. */
export function lag(term: TermLike, steps = 1): Term {
  wholeSteps(steps, "lag");
  return shift(term, steps, "lag");
}

/** The term at each lag from `from` to `to`, both included: `lags("fare", 0, 4)`. */
export function lags(term: TermLike, from: number, to: number): Term[] {
  wholeSteps(from, "lags");
  wholeSteps(to, "lags");
  if (to < from) throw new InputError(`lags: the last lag (${to}) comes before the first (${from}).`);
  return Array.from({ length: to - from + 1 }, (_, i) => shift(term, from + i, "lags"));
}

/** The term `steps` periods later (default 1). */
export function lead(term: TermLike, steps = 1): Term {
  wholeSteps(steps, "lead");
  return shift(term, -steps, "lead");
}
