import { seasonLength, stepName } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { operatorLabel, subscript, superscript } from "../label.js";
import { columnsOf, labelOf, requireOptions } from "../resolve.js";
import { makeTerm, type Term, type TermColumn, type TermLike } from "../term.js";
import { combined } from "./combine.js";
import { log } from "./log.js";
import { lag } from "./shift.js";

/** Options of `diff` and `growth`. */
export interface DifferenceOptions {
  /** How often the difference is taken. Default 1. */
  readonly order?: number;
  /** Steps between the two values, or `"season"` for the same season a cycle before. Default 1. */
  readonly over?: number | "season";
}

/**
 * The change of a term: Δ fare. Any order, over any number of steps or a whole season. In time: across a gap it is
 * missing. Throws InputError for an order or a number of steps that is not 1, 2, ...
 */
export function diff(term: TermLike, options: DifferenceOptions = {}): Term {
  return difference(term, options, "diff");
}

/** The rate of growth as a difference of logarithms: Δ log fare. Options as of `diff`. */
export function growth(term: TermLike, options: DifferenceOptions = {}): Term {
  return difference(log(term), options, "growth");
}

function difference(term: TermLike, options: DifferenceOptions, asked: string): Term {
  requireOptions(asked, options, ["order", "over"]);
  const { order = 1, over = 1 } = options;
  if (!Number.isInteger(order) || order < 1)
    throw new InputError(`${asked}: order must be 1, 2, ..., not ${order}.`);
  if (over !== "season" && (!Number.isInteger(over) || over < 1)) {
    throw new InputError(
      `${asked}: over must be a number of steps from 1 up, or "season", not ${JSON.stringify(over)}.`,
    );
  }
  const sign = (steps: string) => `Δ${steps}${order === 1 ? "" : superscript(order)}`;
  const known = over === "season" ? "ₛ" : over === 1 ? "" : subscript(over);
  return makeTerm(operatorLabel(sign(known), labelOf(term)), (table) => {
    const steps = over === "season" ? seasonLength(table.index.step) : over;
    if (steps === undefined) {
      throw new InputError(
        `${asked}: steps of one ${stepName(table.index.step)} have no season; say over: the number of steps.`,
      );
    }
    let rest: TermLike = term;
    for (let i = 0; i < order; i++) rest = once(rest, steps);
    const labels = columnsOf(term, table);
    return columnsOf(rest, table).map((column, i) => ({
      ...column,
      ...operatorLabel(sign(steps === 1 ? "" : subscript(steps)), labels[i]!),
    }));
  });
}

function once(term: TermLike, steps: number): Term {
  return makeTerm("difference", (table) => {
    const before = columnsOf(lag(term, steps), table);
    return columnsOf(term, table).map(
      (column, i): TermColumn => ({ ...column, ...combined(column, before[i]!, (now, then) => now - then) }),
    );
  });
}
