import { nearestName } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";

/** Position of the term labelled `wanted`; refuses an unknown one, naming the nearest. */
export function termAt(terms: readonly string[], wanted: string, caller: string): number {
  const at = terms.indexOf(wanted);
  if (at >= 0) return at;
  const nearest = nearestName(wanted, terms);
  throw new InputError(
    `${caller}: there is no term "${wanted}" in the fit.${nearest ? ` Did you mean "${nearest}"?` : ""} ` +
      `Its terms are ${terms.join(", ")}.`,
  );
}
