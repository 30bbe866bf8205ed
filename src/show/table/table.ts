import { Result } from "../../data/index.js";
import { csvTable } from "./csv.js";
import { htmlTable } from "./html.js";
import { latexTable } from "./latex.js";
import { markdownTable } from "./markdown.js";
import type { TableModel } from "./model.js";
import { plainTable } from "./plain.js";

/** A table of numbers from a result, ready to be written out. */
export class Table extends Result {
  override readonly kind = "table";
  readonly title: string;
  readonly columns: TableModel["columns"];
  readonly rows: TableModel["rows"];
  readonly fingerprint?: string;

  constructor(model: TableModel, fingerprint?: string) {
    super();
    this.title = model.title;
    this.columns = model.columns;
    this.rows = model.rows;
    if (fingerprint !== undefined) this.fingerprint = fingerprint;
    Object.freeze(this);
  }

  /** A LaTeX `tabular` that needs no package. */
  toLatex(): string {
    return latexTable(this);
  }

  /** A pipe table in Markdown. */
  toMarkdown(): string {
    return markdownTable(this);
  }

  /** CSV (RFC 4180) with numbers at full precision and a header of short names. */
  toCsv(): string {
    return csvTable(this);
  }

  /** An HTML table styled inline. */
  toHtml(): string {
    return htmlTable(this, { caption: true }).markup;
  }

  /** Aligned plain text. */
  toText(): string {
    return plainTable(this);
  }

  override toJSON(): Record<string, unknown> {
    return {
      title: this.title,
      columns: this.columns.map(({ key, title, group }) => (group ? { key, title, group } : { key, title })),
      rows: this.rows.map((row) => row.map(({ text, value }) => (value === undefined ? text : value))),
    };
  }
}
