import { periodLabel, type TimeTable } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import type { Labelled } from "../label.js";
import { columnsOf, labelOf } from "../resolve.js";
import { makeTerm, type Term, type TermColumn, type TermLike } from "../term.js";

/** A term whose columns are those of another, value by value. `problem` says what is wrong with a value, if anything. */
export function mapTerm(
  term: TermLike,
  label: (inner: Labelled) => Labelled,
  transform: (value: number) => number,
  problem?: (value: number) => string | undefined,
): Term {
  return makeTerm(label(labelOf(term)), (table, back) => {
    // What is wrong is looked for where it stands, not where a lag of it would.
    if (problem)
      for (const column of columnsOf(term, table)) refuse(table, column, label(column).label, problem);
    return columnsOf(term, table, back).map((column): TermColumn => {
      return { ...column, ...label(column), values: column.values.map(transform) };
    });
  });
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
