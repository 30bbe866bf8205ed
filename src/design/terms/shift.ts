import { requireRegular, type TimeTable } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { movedLabel } from "../label.js";
import { flatten, labelOf } from "../resolve.js";
import { makeTerm, type Term, type TermColumn, type TermLike } from "../term.js";
import { rowsByPeriod } from "./rows-by-period.js";

function shift(term: TermLike, by: number, asked: string): Term {
  return makeTerm(movedLabel(labelOf(term), by), (table) => {
    requireRegular(table.index, asked);
    return flatten(term).flatMap((part) => {
      const named = (column: TermColumn) => ({ ...column, ...movedLabel(column, by) });
      if (part.at) {
        const there = table.index.ordinals.map((ordinal) => ordinal - by);
        return part.at(table.index, there).map(named);
      }
      return part.columns(table).map((column) => ({ ...named(column), ...moved(column, by, table) }));
    });
  });
}

function moved(column: TermColumn, by: number, { T, index }: TimeTable): Omit<TermColumn, "label"> {
  const values = new Float64Array(T).fill(Number.NaN);
  const edge = new Uint8Array(T);
  const filled = column.filled && new Uint8Array(T);
  const { ordinals } = index;
  if (ordinals[T - 1]! - ordinals[0]! === T - 1) {
    const from = Math.max(0, -by);
    const to = Math.max(from, Math.min(T, T - by));
    edge.fill(1);
    if (to > from) {
      values.set(column.values.subarray(from, to), from + by);
      if (column.edge) edge.set(column.edge.subarray(from, to), from + by);
      else edge.fill(0, from + by, to + by);
      filled?.set(column.filled!.subarray(from, to), from + by);
    }
  } else {
    const rowOf = rowsByPeriod(ordinals);
    for (let row = 0; row < T; row++) {
      const source = rowOf(row, by);
      if (source === -1) edge[row] = 1;
      if (source < 0) continue;
      values[row] = column.values[source]!;
      if (column.edge) edge[row] = column.edge[source]!;
      if (filled) filled[row] = column.filled![source]!;
    }
  }
  const uses = column.uses.map(({ column, newest, oldest }) => ({
    column,
    newest: newest + by,
    oldest: oldest + by,
  }));
  return { values, edge, filled, uses };
}

function wholeSteps(steps: number, asked: string): void {
  if (!Number.isInteger(steps) || steps < 0) {
    throw new InputError(`${asked}: the number of steps must be a whole number from 0 up, not ${steps}.`);
  }
}

/**
 * The term `steps` periods earlier (default 1), in time and not in rows: across a gap it is missing. Throws InputError
 * for steps that are not whole numbers from 0 up.
 */
export function lag(term: TermLike, steps = 1): Term {
  wholeSteps(steps, "lag");
  return shift(term, steps, "lag");
}

/** The term at each lag from `from` to `to`, both included: `lags("fare", 0, 4)`. */
export function lags(term: TermLike, from: number, to: number): Term[] {
  if (to === undefined) {
    throw new InputError(`lags: give the first and the last lag, such as lags("fare", 0, ${from ?? 4}).`);
  }
  wholeSteps(from, "lags");
  wholeSteps(to, "lags");
  if (to < from) throw new InputError(`lags: the last lag (${to}) comes before the first (${from}).`);
  return Array.from({ length: to - from + 1 }, (_, i) => shift(term, from + i, "lags"));
}

/** The term `steps` periods later (default 1), in time: across a gap it is missing. */
export function lead(term: TermLike, steps = 1): Term {
  wholeSteps(steps, "lead");
  return shift(term, -steps, "lead");
}
