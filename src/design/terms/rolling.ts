import { type Aggregate, requireRegular } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { operatorLabel } from "../label.js";
import { labelOf } from "../resolve.js";
import { makeTerm, type Term, type TermColumn, type TermLike } from "../term.js";
import { type Past, pastOf } from "./past.js";

/**
 * An aggregate (`mean`, `sum`, your own function of a Float64Array) of the present and the `length` − 1 periods before:
 * `rolling("rain", mean, 4)`. In time: missing where any of these periods is. Throws InputError for a window that is
 * no whole number from 1 up.
 */
export function rolling(term: TermLike, aggregate: Aggregate, length: number): Term {
  if (typeof aggregate !== "function") {
    throw new InputError('rolling: say what to make of the window, such as rolling("rain", mean, 4).');
  }
  if (!Number.isInteger(length) || length < 1) {
    throw new InputError(`rolling: the window must be a whole number of periods from 1 up, not ${length}.`);
  }
  const operator = `${aggregate.name || "own function"} of ${length}`;
  return makeTerm(operatorLabel(operator, labelOf(term)), (table, back) => {
    requireRegular(table.index, "rolling");
    return pastOf(term, table, back, length).map(
      (past): TermColumn => ({
        ...past.column,
        ...operatorLabel(operator, past.column),
        ...aggregated(past, aggregate),
      }),
    );
  });
}

function aggregated(past: Past, aggregate: Aggregate) {
  const T = past.column.values.length;
  const values = new Float64Array(T).fill(Number.NaN);
  const edge = new Uint8Array(T);
  const filled = past.column.filled && new Uint8Array(T);
  for (let row = 0; row < T; row++) {
    const window = past.values(row);
    if (!window.some(Number.isNaN)) values[row] = aggregate(window);
    else if (past.any("edge", row)) edge[row] = 1;
    if (filled && past.any("filled", row)) filled[row] = 1;
  }
  return { values, edge, filled, uses: past.uses };
}
