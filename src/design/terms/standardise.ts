import { countedSteps } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { operatorLabel, written } from "../label.js";
import { columnsOf, labelOf } from "../resolve.js";
import { makeTerm, type Term, type TermColumn, type TermLike } from "../term.js";

/**
 * The term minus its mean, divided by its standard deviation (divisor n − 1), both over all the table's rows that have
 * it, whatever the sample; the card states them. Throws InputError for a term that does not vary.
 */
export function standardise(term: TermLike): Term {
  return makeTerm(operatorLabel("standardised", labelOf(term)), (table, back) => {
    const present = columnsOf(term, table);
    const wanted = back === 0 ? present : columnsOf(term, table, back);
    return wanted.map((column, j): TermColumn => {
      const { mean, deviation, n } = moments(present[j]!.values);
      if (!(deviation > 0)) throw new InputError(`standardise: "${column.label}" does not vary.`);
      const figure = (value: number) => written(Number(value.toPrecision(6)));
      return {
        ...column,
        ...operatorLabel("standardised", column),
        values: column.values.map((value) => (value - mean) / deviation),
        note: `${column.label} is standardised by mean ${figure(mean)} and standard deviation ${figure(deviation)}, over ${countedSteps(n, table.index.step)}`,
      };
    });
  });
}

function moments(values: Float64Array): { mean: number; deviation: number; n: number } {
  let n = 0;
  let total = 0;
  for (const value of values) {
    if (Number.isNaN(value)) continue;
    n++;
    total += value;
  }
  const mean = total / n;
  let squares = 0;
  for (const value of values) if (!Number.isNaN(value)) squares += (value - mean) ** 2;
  return { mean, deviation: Math.sqrt(squares / (n - 1)), n };
}
