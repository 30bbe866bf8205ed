import { count, number, pValue, type Scale, significant, written } from "../text/figures.js";
import { legible, name } from "../text/legible.js";

/** One cell: what a reader sees, and the value behind it at full precision. */
export interface Cell {
  readonly text: string;
  /** Absent: the text is the value. */
  readonly value?: number | string | boolean | null;
}

/** One column of a table. */
export interface Column {
  /** Its name in CSV: short, without spaces. */
  readonly key: string;
  readonly title: string;
  /** `decimal` lines figures up at their decimal point. Default `left`. */
  readonly align?: "left" | "right" | "decimal";
  /** Its texts may be broken into lines of at least so many em; without it only long ones are. */
  readonly wrap?: number;
  /** Neighbouring columns of one group stand under one heading. */
  readonly group?: string;
}

/** A table as data: every rendering (HTML, plain, LaTeX, Markdown, CSV) is made from it. */
export interface TableModel {
  /** What the table holds, as its caption: `Coefficients of riders`. */
  readonly title: string;
  readonly columns: readonly Column[];
  readonly rows: readonly (readonly Cell[])[];
}

/** A cell with a text from the data or one of our own. */
export function words(text: string): Cell {
  return { text: name(text), value: text };
}

/** A cell with a text of this project that may be long, such as an estimator with its choices spelled out. */
export function sentence(text: string): Cell {
  return { text: legible(text) };
}

/** A cell with a number at a given scale. */
export function figure(value: number, scale: Scale): Cell {
  return { text: written(value, scale), value };
}

/** A cell with a number to `digits` significant digits. */
export function rounded(value: number, digits?: number): Cell {
  return { text: number(value, digits), value };
}

/** A cell with a statistic or ratio to `digits` significant digits. */
export function statistic(value: number, digits?: number): Cell {
  return { text: significant(value, digits), value };
}

/** A cell with a whole number. */
export function counted(value: number): Cell {
  return { text: count(value), value };
}

/** A cell with a p-value. */
export function probability(value: number): Cell {
  return { text: pValue(value), value };
}

/** An empty cell. */
export const blank: Cell = { text: "", value: null };

/** The heading of a column on its own: that of its group with its own. */
export function heading(column: Column): string {
  return [column.group, column.title].filter(Boolean).join(" ");
}

/** A figure's text before its decimal point, and from the point on. */
export function atPoint(text: string): readonly [string, string] {
  const at = text.indexOf(".");
  if (at !== -1) return [text.slice(0, at), text.slice(at)];
  const power = text.indexOf("×");
  return power === -1 ? [text, ""] : [text.slice(0, power), text.slice(power)];
}

/** Neighbouring columns under their common heading, which is undefined for a column that has none. */
export function groups(columns: readonly Column[]): { title: string | undefined; columns: Column[] }[] {
  const runs: { title: string | undefined; columns: Column[] }[] = [];
  for (const column of columns) {
    const last = runs.at(-1);
    if (last && last.title !== undefined && last.title === column.group) last.columns.push(column);
    else runs.push({ title: column.group, columns: [column] });
  }
  return runs;
}
