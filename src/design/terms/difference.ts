import { seasonLength, stepName } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { operatorLabel, subscript, superscript } from "../label.js";
import { columnsOf, labelOf, requireOptions } from "../resolve.js";
import { makeTerm, type Term, type TermColumn, type TermLike } from "../term.js";
import { combined } from "./combine.js";
import { log } from "./log.js";

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
  return makeTerm(operatorLabel(signOf(order, over), labelOf(term)), (table, back) => {
    const steps = over === "season" ? seasonLength(table.index.step) : over;
    if (steps === undefined) {
      throw new InputError(
        `${asked}: steps of one ${stepName(table.index.step)} have no season; say over: the number of steps.`,
      );
    }
    const sign = signOf(order, steps);
    let stage = Array.from({ length: order + 1 }, (_, i) => columnsOf(term, table, back + i * steps));
    for (let i = 0; i < order; i++) stage = stage.slice(1).map((then, j) => changes(stage[j]!, then));
    return stage[0]!.map((column) => ({ ...column, ...operatorLabel(sign, column) }));
  });
}

function changes(now: readonly TermColumn[], then: readonly TermColumn[]): TermColumn[] {
  return now.map((column, j) => ({ ...column, ...combined(column, then[j]!, (a, b) => a - b) }));
}

function signOf(order: number, steps: number | "season"): string {
  const below = steps === "season" ? "ₛ" : steps === 1 ? "" : subscript(steps);
  return `Δ${below}${order === 1 ? "" : superscript(order)}`;
}
