import { seasonLength, stepName } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { columnsOf, labelOf } from "../resolve.js";
import { makeTerm, type Term, type TermColumn, type TermLike } from "../term.js";
import { lag } from "./shift.js";
import { log } from "./transform.js";

/** Options of `diff` and `growth`. */
export interface DifferenceOptions {
  /** How often the difference is taken. Default 1. */
  readonly order?: number;
  /** Steps between the two values, or `"season"` for the same season a cycle before. Default 1. */
  readonly over?: number | "season";
}

/** The change of a term over one step: Δ fare. Any order, over any number of steps or a whole season. */
export function diff(term: TermLike, options: DifferenceOptions = {}): Term {
  const { order = 1, over = 1 } = options;
  if (!Number.isInteger(order) || order < 1)
    throw new InputError(`diff: order must be 1, 2, ..., not ${order}.`);
  if (over !== "season" && (!Number.isInteger(over) || over < 1)) {
    throw new InputError(
      `diff: over must be a number of steps from 1 up, or "season", not ${JSON.stringify(over)}.`,
    );
  }
  let result = once(term, over);
  for (let i = 1; i < order; i++) result = once(result, over);
  return result;
}

function once(term: TermLike, over: number | "season"): Term {
  const label = (inner: string) =>
    over === 1 ? `Δ ${inner}` : over === "season" ? `Δ season ${inner}` : `Δ${over} ${inner}`;
  return makeTerm(label(labelOf(term)), (table) => {
    const steps = over === "season" ? seasonLength(table.index.step) : over;
    if (steps === undefined) {
      throw new InputError(
        `diff: steps of one ${stepName(table.index.step)} have no season; say over: the number of steps.`,
      );
    }
    const before = columnsOf(lag(term, steps), table);
    return columnsOf(term, table).map(
      (column, i): TermColumn => ({
        ...column,
        label: label(column.label),
        values: column.values.map((value, row) => value - before[i]!.values[row]!),
        edge: Uint8Array.from(before[i]!.edge!, (flag, row) => (flag || column.edge?.[row] ? 1 : 0)),
      }),
    );
  });
}

/** The rate of growth as a difference of logarithms: Δ log fare. */
export function growth(term: TermLike, options: DifferenceOptions = {}): Term {
  return diff(log(term), options);
}
