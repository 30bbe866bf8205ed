import type { TimeIndex, TimeTable } from "../data/index.js";
import type { Labelled } from "./label.js";
import { moved } from "./moved.js";

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
  /** The way out where it is zero in every period used: one level of several cannot just be left out. */
  readonly whenZero?: string;
}

/** An explanation: a function of time that makes one or more columns from a table. */
export interface Term extends Labelled {
  readonly kind: "term";
  /**
   * Its columns: for each row of the table, what the term was `back` periods before (default 0; negative: after). A lag
   * asks what is inside it for an earlier time, so that no nesting loses a period that another would have.
   */
  columns(table: TimeTable, back?: number): readonly TermColumn[];
}

/** What stands for a term: a column's exact name, a term, or a list of them. */
export type TermLike = string | Term | readonly TermLike[];

/** A term from its label and what it makes of a table. */
export function makeTerm(
  named: string | Labelled,
  columns: (table: TimeTable, back: number) => readonly TermColumn[],
): Term {
  const { label, form } = typeof named === "string" ? { label: named, form: undefined } : named;
  return Object.freeze({
    kind: "term" as const,
    label,
    form,
    columns: (table: TimeTable, back = 0) => columns(table, back),
  });
}

/** A term made of what stands in the table's own rows. */
export function rowTerm(label: string, columns: (table: TimeTable) => readonly TermColumn[]): Term {
  return makeTerm(label, (table, back) => columns(table).map((column) => moved(column, back, table)));
}

/** A term made of time alone: it is known at every period, also beyond the table. */
export function calendarTerm(
  label: string,
  at: (index: TimeIndex, ordinals: Float64Array) => readonly TermColumn[],
): Term {
  return makeTerm(label, ({ index }, back) => {
    const ordinals = back === 0 ? index.ordinals : index.ordinals.map((ordinal) => ordinal - back);
    return at(index, ordinals);
  });
}

/** Whether a value is a term. */
export function isTerm(value: unknown): value is Term {
  return typeof value === "object" && value !== null && (value as Term).kind === "term";
}
