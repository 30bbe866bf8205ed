import { InputError } from "../../numeric/index.js";
import { multipleLabel } from "../label.js";
import type { Term, TermLike } from "../term.js";
import { mapTerm } from "./map.js";

/** The term times a number: `times("fare", 100)`. Throws InputError for a factor that is not finite, or zero. */
export function times(term: TermLike, factor: number): Term {
  if (typeof factor !== "number" || !Number.isFinite(factor) || factor === 0) {
    throw new InputError(`times: the factor must be a number other than zero, not ${String(factor)}.`);
  }
  return mapTerm(
    term,
    (inner) => multipleLabel(factor, inner),
    (value) => value * factor,
  );
}
