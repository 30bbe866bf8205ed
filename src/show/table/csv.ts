import type { Cell, TableModel } from "./model.js";

/**
 * A table as CSV (RFC 4180, UTF-8, CRLF): a header of short column names, numbers at full precision with a plain minus,
 * missing numbers empty. A text that a spreadsheet would run as a formula (one that starts with `=`, `+`, `-`, `@`, a
 * tab or a line break) gets an apostrophe in front, as spreadsheets write such texts themselves.
 */
export function csvTable(table: TableModel): string {
  const lines = [
    table.columns.map((column) => quoted(column.key)),
    ...table.rows.map((row) => row.map(field)),
  ];
  return lines.map((line) => `${line.join(",")}\r\n`).join("");
}

function field(cell: Cell): string {
  const value = cell.value === undefined ? cell.text : cell.value;
  if (value === null) return "";
  if (typeof value === "number") return Number.isNaN(value) ? "" : String(value);
  if (typeof value === "boolean") return String(value);
  return quoted(/^[=+\-@\t\r\n]/.test(value) ? `'${value}` : value);
}

function quoted(text: string): string {
  return /[",\r\n]/.test(text) || text.trim() !== text ? `"${text.replaceAll('"', '""')}"` : text;
}
