import { type LoadOptions, missingTexts } from "../options.js";
import { RowProblem } from "../problem.js";
import type { RawColumn } from "../raw-table.js";
import type { Dialect } from "./dialect.js";
import { type Kind, type Kinds, kindOf } from "./kinds.js";
import type { NumberStyle } from "./number-style.js";
import { type RawRecord, RecordSplitter } from "./records.js";
import { textOf } from "./text-source.js";

/** What a delimited file gives: its columns, and what had to be taken care of. */
export interface DelimitedContent {
  readonly columns: readonly RawColumn[];
  /** For each column, how often each marker of a missing value stands in it. */
  readonly markers: readonly ReadonlyMap<string, number>[];
  readonly blankLines: number;
  readonly firstBlank: number;
}

/**
 * Reads a delimited file cell by cell, in any encoding, style of numbers and mix of line ends; what it accepts is the
 * definition of what a file may hold. Throws RowProblem at the first row that cannot be taken. About ten times slower
 * than `readFast`, which gives the same columns where it can read a file at all.
 */
export async function readStrictly(
  path: string,
  dialect: Dialect,
  { kinds, style }: Kinds,
  options: LoadOptions,
  onRows?: (rows: number) => void,
): Promise<DelimitedContent> {
  const missing = missingTexts(options);
  const builders = dialect.header.map((name, i) => new Builder(name, kinds[i]!, style, missing));
  const skip = options.skip ?? 0;
  const splitter = new RecordSplitter(dialect.delimiter, skip + 1);
  let row = dialect.headerless ? 0 : -1;
  const take = (record: RawRecord) => {
    if (row >= 0) addRow(builders, record, row, dialect);
    row++;
    if (row % 50_000 === 0) onRows?.(row);
  };
  for await (const piece of textOf(path, dialect.encoding, skip)) {
    for (const record of splitter.push(piece, false)) take(record);
  }
  for (const record of splitter.push("", true)) take(record);
  return {
    columns: builders.map((builder) => builder.column()),
    markers: builders.map((builder) => builder.markers),
    blankLines: splitter.blankLines,
    firstBlank: splitter.firstBlank,
  };
}

function addRow(builders: readonly Builder[], record: RawRecord, row: number, dialect: Dialect): void {
  const { fields, line, fault } = record;
  if (fault) throw new RowProblem(row, "", `${fault}. Mend the line in the file.`, line);
  // A delimiter at the end of the line, with nothing after it, loses nothing.
  const trailing = fields.length === dialect.header.length + 1 && fields[fields.length - 1] === "";
  if (fields.length !== dialect.header.length && !trailing) {
    throw new RowProblem(
      row,
      "",
      `it has ${fields.length} ${fields.length === 1 ? "field" : "fields"}, but the header names ${dialect.header.length} columns. Mend the line in the file.`,
      line,
    );
  }
  for (let i = 0; i < builders.length; i++) builders[i]!.add(fields[i]!, row, line);
}

/** Collects the cells of one column. */
class Builder {
  readonly markers = new Map<string, number>();
  #numbers = new Float64Array(0);
  readonly #texts: (string | null)[] = [];
  #count = 0;

  constructor(
    readonly name: string,
    readonly kind: Kind,
    readonly style: NumberStyle,
    readonly missing: ReadonlySet<string>,
  ) {
    if (kind === "number" || kind === "boolean") this.#numbers = new Float64Array(1024);
  }

  add(field: string, row: number, line: number): void {
    const isText = this.kind === "text" || this.kind === "time";
    const marker = isText ? field : field.trim();
    const isMissing = this.missing.has(marker);
    if (isMissing) this.markers.set(marker, (this.markers.get(marker) ?? 0) + 1);
    if (this.kind === "number" || this.kind === "boolean") {
      if (this.#count === this.#numbers.length) {
        const longer = new Float64Array(2 * this.#numbers.length);
        longer.set(this.#numbers);
        this.#numbers = longer;
      }
      this.#numbers[this.#count++] = isMissing ? Number.NaN : this.value(field, row, line);
    } else this.#texts.push(isMissing ? null : field);
  }

  /** The number that a field is. Throws RowProblem when it is none. */
  value(field: string, row: number, line?: number): number {
    const where = `column ${JSON.stringify(this.name)}`;
    const said = JSON.stringify(field.length > 100 ? `${field.slice(0, 100)}…` : field);
    const text = `or keep the column as text with text: [${JSON.stringify(this.name)}]`;
    if (this.kind === "boolean") {
      if (/^\s*true\s*$/i.test(field)) return 1;
      if (/^\s*false\s*$/i.test(field)) return 0;
      throw new RowProblem(row, where, `${said} is neither true nor false. Mend the cell, ${text}.`, line);
    }
    const value = this.style.read(field);
    if (Number.isNaN(value)) {
      throw new RowProblem(
        row,
        where,
        `${said} is not a number. Mend the cell, name it in missing: [${said}, ...] if it stands for a missing value, ${text}.`,
        line,
      );
    }
    if (!Number.isFinite(value)) {
      const why = /inf/i.test(field) ? `${said} is infinite` : `${said} is too large for a double`;
      throw new RowProblem(row, where, `${why}. Mend the cell, or leave it blank if it is missing.`, line);
    }
    return value;
  }

  column(): RawColumn {
    if (this.kind === "number" || this.kind === "boolean") {
      return { name: this.name, kind: this.kind, values: this.#numbers.slice(0, this.#count) };
    }
    const column: RawColumn = { name: this.name, kind: "text", values: this.#texts };
    return this.kind === "undecided" ? settle(column, this.style, this.kind) : column;
  }
}

/**
 * Turns texts into what they are: of the given kind, or where the first rows were all blank, of the kind that all of
 * the values show. Throws RowProblem for a cell that is of another kind.
 */
export function settle(column: RawColumn & { kind: "text" }, style: NumberStyle, given: Kind): RawColumn {
  const kind =
    given === "undecided"
      ? kindOf(
          column.values.filter((text) => text !== null),
          style,
        )
      : given;
  if (kind !== "number" && kind !== "boolean") return column;
  const builder = new Builder(column.name, kind, style, new Set());
  const values = Float64Array.from(column.values, (text, row) =>
    text === null ? Number.NaN : builder.value(text, row),
  );
  return { name: column.name, kind, values };
}
