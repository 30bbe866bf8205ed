import { periodLabel, type TimeTable } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { columnsOf, labelOf } from "../resolve.js";
import { makeTerm, type Term, type TermColumn, type TermLike } from "../term.js";

/** A term whose columns are those of another, value by value. `problem` says what is wrong with a value, if anything. */
export function mapTerm(
  term: TermLike,
  label: (inner: string) => string,
  transform: (value: number) => number,
  problem?: (value: number) => string | undefined,
): Term {
  return makeTerm(label(labelOf(term)), (table) =>
    columnsOf(term, table).map((column): TermColumn => {
      if (problem) refuse(table, column, label(column.label), problem);
      return { ...column, label: label(column.label), values: column.values.map(transform) };
    }),
  );
}

function refuse(
  table: TimeTable,
  column: TermColumn,
  label: string,
  problem: (value: number) => string | undefined,
): void {
  for (let row = 0; row < table.T; row++) {
    const why = Number.isNaN(column.values[row]!) ? undefined : problem(column.values[row]!);
    if (why === undefined) continue;
    const period = periodLabel(table.index, table.index.ordinals[row]!);
    throw new InputError(
      `${label}: "${column.label}" is ${column.values[row]} in ${period} (row ${row + 1}), ${why}.`,
    );
  }
}

/** The natural logarithm. Refuses values that are not above zero, naming the first. */
export function log(term: TermLike): Term {
  return mapTerm(
    term,
    (label) => `log ${label}`,
    Math.log,
    (value) => (value > 0 ? undefined : "which has no logarithm"),
  );
}

/** The term times a number: `times("fare", 100)`. */
export function times(term: TermLike, factor: number): Term {
  if (!Number.isFinite(factor)) throw new InputError(`times: the factor must be a number, not ${factor}.`);
  return mapTerm(
    term,
    (label) => `${factor} × ${label}`,
    (value) => value * factor,
  );
}

/** The term minus its mean, divided by its standard deviation (divisor n − 1), both over the table's rows that have it. */
export function standardise(term: TermLike): Term {
  const name = (label: string) => `${label}, standardised`;
  return makeTerm(name(labelOf(term)), (table) =>
    columnsOf(term, table).map((column): TermColumn => {
      const present = column.values.filter((value) => !Number.isNaN(value));
      const mean = present.reduce((sum, value) => sum + value, 0) / present.length;
      const spread = Math.sqrt(
        present.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (present.length - 1),
      );
      if (!(spread > 0)) throw new InputError(`standardise: "${column.label}" does not vary.`);
      return {
        ...column,
        label: name(column.label),
        values: column.values.map((value) => (value - mean) / spread),
      };
    }),
  );
}

/** The product of two terms, each column of one with each of the other. */
export function product(a: TermLike, b: TermLike): Term {
  return makeTerm(`${labelOf(a)} × ${labelOf(b)}`, (table) =>
    columnsOf(a, table).flatMap((left) =>
      columnsOf(b, table).map((right): TermColumn => {
        const edge = Uint8Array.from({ length: table.T }, (_, row) =>
          left.edge?.[row] || right.edge?.[row] ? 1 : 0,
        );
        return {
          label: `${left.label} × ${right.label}`,
          values: left.values.map((value, row) => value * right.values[row]!),
          edge,
          uses: [...left.uses, ...right.uses],
          ...(left.past && right.past ? { past: true } : {}),
        };
      }),
    ),
  );
}
