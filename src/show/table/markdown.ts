import { padEnd, padStart, width } from "../text/width.js";
import { heading, type TableModel } from "./model.js";

/** A table in Markdown (the pipe tables of GitHub Flavored Markdown), its source aligned too. */
export function markdownTable(table: TableModel): string {
  const left = table.columns.map((column) => (column.align ?? "left") === "left");
  const head = table.columns.map((column) => escapeMarkdown(heading(column)));
  const rows = table.rows.map((row) => row.map((cell) => escapeMarkdown(cell.text)));
  const widths = head.map((title, j) =>
    rows.reduce((most, row) => Math.max(most, width(row[j]!)), Math.max(4, width(title))),
  );
  const line = (cells: readonly string[]) =>
    `| ${cells.map((cell, j) => (left[j] ? padEnd(cell, widths[j]!) : padStart(cell, widths[j]!))).join(" | ")} |`;
  const ruler = widths.map((w, j) => (left[j] ? "-".repeat(w) : `${"-".repeat(w - 1)}:`));
  return `${[line(head), line(ruler), ...rows.map(line)].join("\n")}\n`;
}

/** A text with everything that means something to Markdown, or to HTML inside it, made harmless. */
export function escapeMarkdown(text: string): string {
  return text
    .replace(/[\\`*_{}[\]()#+!|~$^]/g, (c) => (c === "(" || c === ")" ? c : `\\${c}`))
    .replace(/&/g, "&amp;")
    .replace(/</g, "&lt;")
    .replace(/>/g, "&gt;");
}
