import { type Aggregate, requireRegular, type TimeTable } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { operatorLabel } from "../label.js";
import { columnsOf, labelOf } from "../resolve.js";
import { makeTerm, type Term, type TermColumn, type TermLike } from "../term.js";
import { rowsByPeriod } from "./rows-by-period.js";

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
  return makeTerm(operatorLabel(operator, labelOf(term)), (table) => {
    requireRegular(table.index, "rolling");
    return columnsOf(term, table).map(
      (column): TermColumn => ({
        ...column,
        ...operatorLabel(operator, column),
        ...windows(column, aggregate, length, table),
      }),
    );
  });
}

function windows(column: TermColumn, aggregate: Aggregate, length: number, table: TimeTable) {
  const { T } = table;
  const rowOf = rowsByPeriod(table.index.ordinals);
  const values = new Float64Array(T).fill(Number.NaN);
  const edge = new Uint8Array(T);
  const filled = column.filled && new Uint8Array(T);
  for (let row = 0; row < T; row++) {
    const window = new Float64Array(length);
    let whole = true;
    for (let i = 0; i < length; i++) {
      const source = rowOf(row, length - 1 - i);
      window[i] = source < 0 ? Number.NaN : column.values[source]!;
      if (Number.isNaN(window[i]!)) whole = false;
      if (source === -1 || column.edge?.[source]) edge[row] = 1;
      if (filled && column.filled![source]) filled[row] = 1;
    }
    if (whole) values[row] = aggregate(window);
  }
  const uses = column.uses.map((use) => ({ ...use, oldest: use.oldest + length - 1 }));
  return { values, edge, filled, uses };
}
