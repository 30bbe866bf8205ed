import type { TimeIndex, TimeTable } from "../data/index.js";
import type { Labelled } from "./label.js";

/** How a term draws on a column of the table: its values at lags `newest` to `oldest` (negative: leads). */
export interface Use {
  readonly column: string;
  readonly newest: number;
  readonly oldest: number;
}

/** One column that a term contributes, over the rows of the table. */
export interface TermColumn extends Labelled {
  /** One value per row of the table, NaN where the term has none. */
  readonly values: Float64Array;
  /**
   * 1 where the value is missing only because the term reaches beyond what was observed (a lag at the start, a lead
   * at the end): such periods fall out of the sample without asking, and the card says how many.
   */
  readonly edge?: Uint8Array | undefined;
  /** 1 where the value rests on one that was filled in and not observed. */
  readonly filled?: Uint8Array | undefined;
  /** The columns that it is made of. */
  readonly uses: readonly Use[];
  /** What a card must say about it: the base of a set of levels. */
  readonly note?: string;
}

/** An explanation: makes one or more columns from a table. */
export interface Term extends Labelled {
  readonly kind: "term";
  columns(table: TimeTable): readonly TermColumn[];
  /** For a term made of time alone: its columns at any periods, so that a lag of it loses none. */
  at?(index: TimeIndex, ordinals: Float64Array): readonly TermColumn[];
}

/** What stands for a term: a column's exact name, a term, or a list of them. */
export type TermLike = string | Term | readonly TermLike[];

/** A term from its label and what it makes of a table. */
export function makeTerm(named: string | Labelled, columns: Term["columns"]): Term {
  const { label, form } = typeof named === "string" ? { label: named, form: undefined } : named;
  return Object.freeze({ kind: "term" as const, label, form, columns });
}

/** A term made of time alone. */
export function calendarTerm(label: string, at: NonNullable<Term["at"]>): Term {
  return Object.freeze({
    ...makeTerm(label, ({ index }) => at(index, index.ordinals)),
    at,
  });
}

/** Whether a value is a term. */
export function isTerm(value: unknown): value is Term {
  return typeof value === "object" && value !== null && (value as Term).kind === "term";
}
