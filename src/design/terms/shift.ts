import { requireRegular } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { movedLabel } from "../label.js";
import { columnsOf, labelOf } from "../resolve.js";
import { makeTerm, type Term, type TermLike } from "../term.js";

function shift(term: TermLike, by: number, asked: string): Term {
  return makeTerm(movedLabel(labelOf(term), by), (table, back) => {
    requireRegular(table.index, asked);
    return columnsOf(term, table, back + by).map((column) => ({ ...column, ...movedLabel(column, by) }));
  });
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
