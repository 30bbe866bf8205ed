import type { TimeTable } from "../data/index.js";
import { InputError } from "../numeric/index.js";
import { isTerm, makeTerm, type Term, type TermColumn, type TermLike } from "./term.js";

/** The term for a column's exact name: the name is never parsed. */
export function columnTerm(name: string): Term {
  return makeTerm(name, (table) => [{ label: name, values: table.numbers(name), uses: [name] }]);
}

/** All terms of a list, however nested, in order. Throws InputError for anything that is no term. */
export function flatten(terms: TermLike | readonly TermLike[]): Term[] {
  if (typeof terms === "string") return [columnTerm(terms)];
  if (isTerm(terms)) return [terms];
  if (Array.isArray(terms)) return terms.flatMap((term) => flatten(term as TermLike));
  throw new InputError(
    `${describe(terms)} is no term. A term is a column's name, or made by lag, lags, diff, log, trend, seasonal, step and the like.`,
  );
}

function describe(value: unknown): string {
  if (typeof value === "function") return `the function ${value.name || "(without a name)"}`;
  if (typeof value === "object" && value !== null) return "an object that is not a term";
  return JSON.stringify(value) ?? String(value);
}

/** The columns of whatever stands for a term. */
export function columnsOf(term: TermLike, table: TimeTable): TermColumn[] {
  return flatten(term).flatMap((part) => [...part.columns(table)]);
}

/** The label of whatever stands for a term. */
export function labelOf(term: TermLike): string {
  return flatten(term)
    .map(({ label }) => label)
    .join(", ");
}
