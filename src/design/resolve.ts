import { suggestion, type TimeTable } from "../data/index.js";
import { InputError } from "../numeric/index.js";
import type { Labelled } from "./label.js";
import { isTerm, rowTerm, type Term, type TermColumn, type TermLike } from "./term.js";

/** The term for a column's exact name: the name is never parsed. */
export function columnTerm(name: string): Term {
  return rowTerm(name, (table) => {
    const values = table.numbers(name);
    const { filled } = table.column(name);
    return [{ label: name, values, filled, uses: [{ column: name, newest: 0, oldest: 0 }] }];
  });
}

/** All terms of a list, however nested, in order. Throws InputError for anything that is no term. */
export function flatten(terms: TermLike | readonly TermLike[]): Term[] {
  if (typeof terms === "string") return [columnTerm(terms)];
  if (isTerm(terms)) return [terms];
  if (Array.isArray(terms)) return terms.flatMap((term) => flatten(term as TermLike));
  throw new InputError(`${describe(terms)} is no term. ${wayOut(terms)}`);
}

function describe(value: unknown): string {
  if (typeof value === "function") return `the function ${value.name || "(without a name)"}`;
  if (typeof value === "object" && value !== null) return "an object that is not a term";
  return JSON.stringify(value) ?? String(value);
}

function wayOut(value: unknown): string {
  if (typeof value === "function") {
    return 'A maker of terms is called, such as trend(); a function of a row gets a name: own("name", r => ...).';
  }
  return "A term is a column's name, or made by lag, lags, diff, log, trend, seasonal, step and the like.";
}

/** The columns of whatever stands for a term, `back` periods before each row of the table. */
export function columnsOf(term: TermLike, table: TimeTable, back = 0): TermColumn[] {
  return flatten(term).flatMap((part) => [...part.columns(table, back)]);
}

/** The label of whatever stands for a term; of a list, all of them. */
export function labelOf(term: TermLike): Labelled {
  const parts = flatten(term);
  if (parts.length === 1) return parts[0]!;
  return { label: parts.map(({ label }) => label).join(", ") };
}

/** Refuses options that are no object, or hold a name that is not known. */
export function requireOptions(asked: string, options: unknown, known: readonly string[]): void {
  if (typeof options !== "object" || options === null || Array.isArray(options)) {
    throw new InputError(
      `${asked}: options come in braces, such as { ${known[0]}: ... }, not as ${describe(options)}.`,
    );
  }
  for (const name of Object.keys(options)) {
    if (!known.includes(name))
      throw new InputError(`${asked}: there is no option ${JSON.stringify(name)}.${suggestion(name, known)}`);
  }
}
