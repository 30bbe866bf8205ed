import type { TimeTable } from "../data/index.js";

/** One column that a term contributes, over the rows of the table. */
export interface TermColumn {
  /** As the trade writes it: `fare (t−1)`. */
  readonly label: string;
  /** One value per row of the table, NaN where the term has none. */
  readonly values: Float64Array;
  /**
   * 1 where the value is missing only because the term reaches beyond what was observed (a lag at the start, a lead
   * at the end): such periods fall out of the sample without asking, and the card says how many.
   */
  readonly edge?: Uint8Array;
  /** Names of the columns that it is made of. */
  readonly uses: readonly string[];
  /** Whether it holds past values only: every use of a column is lagged by one step or more. */
  readonly past?: boolean;
  /** What a card must say about it: the base of a set of levels. */
  readonly note?: string;
}

/** An explanation: makes one or more columns from a table. */
export interface Term {
  readonly kind: "term";
  /** Short writing, for messages. */
  readonly label: string;
  columns(table: TimeTable): readonly TermColumn[];
}

/** What stands for a term: a column's exact name, a term, or a list of them. */
export type TermLike = string | Term | readonly TermLike[];

/** A term from its label and what it makes of a table. */
export function makeTerm(label: string, columns: (table: TimeTable) => readonly TermColumn[]): Term {
  return Object.freeze({ kind: "term" as const, label, columns });
}

/** Whether a value is a term. */
export function isTerm(value: unknown): value is Term {
  return typeof value === "object" && value !== null && (value as Term).kind === "term";
}
