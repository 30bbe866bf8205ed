import { operatorLabel } from "../label.js";
import type { Term, TermLike } from "../term.js";
import { mapTerm } from "./map.js";

/**
 * The natural logarithm. Throws InputError, naming the first, for values that are not above zero anywhere in the
 * table: `.between(...)` cuts them off where they lie outside the sample.
 */
export function log(term: TermLike): Term {
  return mapTerm(
    term,
    (inner) => operatorLabel("log", inner),
    Math.log,
    (value) => (value > 0 ? undefined : "which has no logarithm"),
  );
}
