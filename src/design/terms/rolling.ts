import { type Aggregate, requireRegular } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { columnsOf, labelOf } from "../resolve.js";
import { makeTerm, type Term, type TermColumn, type TermLike } from "../term.js";
import { rowByOrdinal } from "./shift.js";

/** An aggregate (`mean`, `sum`, your own) of the present and the `length` − 1 periods before: `rolling("rain", mean, 4)`. */
export function rolling(term: TermLike, aggregate: Aggregate, length: number): Term {
  if (!Number.isInteger(length) || length < 1) {
    throw new InputError(`rolling: the window must be a whole number of periods from 1 up, not ${length}.`);
  }
  const name = aggregate.name || "own function";
  const label = (inner: string) => `${name} of ${length} ${inner}`;
  return makeTerm(label(labelOf(term)), (table) => {
    requireRegular(table.index, "rolling");
    const { ordinals } = table.index;
    const place = rowByOrdinal(ordinals);
    return columnsOf(term, table).map((column): TermColumn => {
      const edge = new Uint8Array(table.T);
      const window = new Float64Array(length);
      const values = Float64Array.from(ordinals, (ordinal, row) => {
        for (let i = 0; i < length; i++) {
          const source = place(ordinal - length + 1 + i);
          if (source === -1 || column.edge?.[source]) edge[row] = 1;
          window[i] = source < 0 ? Number.NaN : column.values[source]!;
        }
        return window.some(Number.isNaN) ? Number.NaN : aggregate(window);
      });
      return { ...column, label: label(column.label), values, edge };
    });
  });
}
