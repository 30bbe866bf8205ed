import { InputError } from "../numeric/index.js";
import type { Column } from "./column.js";
import { findingsOf, gapsOf } from "./findings.js";
import { fingerprintOf } from "./fingerprint.js";
import { suggestion } from "./nearest.js";
import { irregularities } from "./regular.js";
import { between } from "./reshape/between.js";
import { type DedupeHow, dedupe } from "./reshape/dedupe.js";
import { type Definition, define } from "./reshape/define.js";
import { drop, dropMissing } from "./reshape/drop.js";
import { type FillHow, fill } from "./reshape/fill.js";
import { type JoinOptions, join } from "./reshape/join.js";
import { rename } from "./reshape/rename.js";
import { select } from "./reshape/select.js";
import { sort } from "./reshape/sort.js";
import { type Aggregates, type StepOptions, toStep } from "./reshape/to-step.js";
import { type Remark, Result } from "./result.js";
import { type ColumnSummary, columnSummary } from "./summary.js";
import { type Step, stepName } from "./time/step.js";
import { periodLabel, spanText, type TimeIndex } from "./time/time-index.js";

/** Where a table came from. */
export interface TableSource {
  /** Path, database and query, or `rows`. */
  readonly description: string;
  /** SHA-256 of the file's bytes. */
  readonly fingerprint?: string;
}

/** What a table is made of. */
export interface TableParts {
  readonly index: TimeIndex;
  readonly columns: readonly Column[];
  /** One line for each step taken, from the source on. */
  readonly provenance: readonly string[];
  /** What was noticed when reading, beside what the content itself shows. */
  readonly readingFindings?: readonly Remark[];
  readonly source?: TableSource;
}

/**
 * Columns observed over time, one row a period. Immutable: every reshaping gives a new table and adds a line to
 * `provenance`. Rows that are unsorted or doubled are a finding; what needs the order of time refuses them.
 */
export class TimeTable extends Result {
  override readonly kind = "time-table";
  readonly index: TimeIndex;
  readonly columns: readonly Column[];
  readonly provenance: readonly string[];
  readonly readingFindings: readonly Remark[];
  readonly source: TableSource | undefined;
  /** Number of rows. */
  readonly T: number;
  readonly #byName: ReadonlyMap<string, Column>;
  #fingerprint: string | undefined;
  #findings: readonly Remark[] | undefined;
  #summaries: readonly ColumnSummary[] | undefined;

  constructor(parts: TableParts) {
    super();
    this.index = parts.index;
    this.columns = parts.columns;
    this.provenance = parts.provenance;
    this.readingFindings = parts.readingFindings ?? [];
    this.source = parts.source;
    this.T = parts.index.ordinals.length;
    this.#byName = new Map(parts.columns.map((column) => [column.name, column]));
  }

  /** Names of the columns, the time column not among them. */
  get names(): string[] {
    return this.columns.map((column) => column.name);
  }

  /** Labels of the periods, one per row. */
  get periods(): string[] {
    return Array.from(this.index.ordinals, (ordinal) => periodLabel(this.index, ordinal));
  }

  /** What to know about the table: how it was read, gaps, missing values. */
  get findings(): readonly Remark[] {
    this.#findings ??= [
      ...this.readingFindings,
      ...irregularities(this.index),
      ...findingsOf(this.index, this.columns),
    ];
    return this.#findings;
  }

  /** What each column holds: kind of value, range, what is missing where, what was filled. */
  get summaries(): readonly ColumnSummary[] {
    this.#summaries ??= this.columns.map((column) => columnSummary(column, this.index));
    return this.#summaries;
  }

  /** SHA-256 over the canonical numbers and the time index (not the file's bytes). */
  get fingerprint(): string {
    this.#fingerprint ??= fingerprintOf(this.index, this.columns);
    return this.#fingerprint;
  }

  has(name: string): boolean {
    return this.#byName.has(name);
  }

  /** The column of that name. Throws InputError, suggesting the nearest name. */
  column(name: string): Column {
    const column = this.#byName.get(name);
    if (column) return column;
    throw new InputError(`the table has no column ${JSON.stringify(name)}.${suggestion(name, this.names)}`);
  }

  /** The values of a column of numbers (missing: NaN), not a copy. Throws InputError for a text column. */
  numbers(name: string): Float64Array {
    const column = this.column(name);
    if (column.kind !== "text") return column.values;
    const row = column.values.findIndex((value) => value !== null);
    throw new InputError(
      `column ${JSON.stringify(name)} holds text (${JSON.stringify(column.values[row] ?? "")} in ` +
        `${periodLabel(this.index, this.index.ordinals[Math.max(0, row)]!)}), not numbers; use categories(${JSON.stringify(name)}) for groups`,
    );
  }

  /** The rows from one period to another, both included; either end may be left out. */
  between(from?: string | number, to?: string | number): TimeTable {
    return between(this, from, to);
  }

  /** The same series at a coarser step: `weeks.to("month", { fare: mean, riders: sum })`. */
  to(step: string | Step, aggregates: Aggregates, options?: StepOptions): TimeTable {
    return toStep(this, step, aggregates, options);
  }

  /** New columns from each row: `.define({ real: r => r.fare / r.prices })`. A name already there is replaced. */
  define(definitions: Readonly<Record<string, Definition>>): TimeTable {
    return define(this, definitions);
  }

  /** Only these columns, in this order. */
  select(...names: string[]): TimeTable {
    return select(this, names);
  }

  /** Other names for columns: `.rename({ old: "new" })`. */
  rename(names: Readonly<Record<string, string>>): TimeTable {
    return rename(this, names);
  }

  /** Without these columns. */
  drop(...names: string[]): TimeTable {
    return drop(this, names);
  }

  /** Without the rows in which any of these columns (all, when none is named) is missing. */
  dropMissing(...names: string[]): TimeTable {
    return dropMissing(this, names);
  }

  /** The columns of another table of the same or a coarser step beside these, matched by period. */
  join(other: TimeTable, options?: JoinOptions): TimeTable {
    return join(this, other, options);
  }

  /** Missing values of a column, inside gaps of the rows too, filled in and marked as filled. */
  fill(name: string, how: FillHow): TimeTable {
    return fill(this, name, how);
  }

  /** The rows in order of time; rows of one period keep the order they had. */
  sort(): TimeTable {
    return sort(this);
  }

  /** Rows of one period made one: the `first`, the `last`, the `mean` of numbers, or one of `identical` rows. */
  dedupe(how: DedupeHow): TimeTable {
    return dedupe(this, how);
  }

  override toJSON(): Record<string, unknown> {
    const label = (ordinal: number) => periodLabel(this.index, ordinal);
    return {
      kind: this.kind,
      span: spanText(this.index),
      step: stepName(this.index.step),
      T: this.T,
      time: this.index.name,
      gaps: gapsOf(this.index).map(({ first, last }) => [label(first), label(last)]),
      columns: this.columns.map((column, i) => {
        const { stretches, ...summary } = this.summaries[i]!;
        return {
          ...summary,
          kind: column.kind,
          holds: summary.kind,
          missingPeriods: stretches.slice(0, 100).map(({ first, last }) => [label(first), label(last)]),
        };
      }),
      findings: this.findings,
      provenance: this.provenance,
      source: this.source,
      fingerprint: this.fingerprint,
    };
  }
}
