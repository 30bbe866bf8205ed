import { padEnd, padStart, width } from "../text/width.js";
import { atPoint, type Column, groups, type TableModel } from "./model.js";

const gap = "  ";

/** A table as aligned text: columns two spaces apart, figures lined up at their decimal point, no rulers. */
export function plainTable(table: TableModel): string {
  const columns = table.columns.map((column, j) =>
    aligned(
      column,
      table.rows.map((row) => row[j]!.text),
    ),
  );
  const titles = table.columns.map((column) => (column.group === undefined ? "" : column.title));
  const runs = groups(table.columns);
  const upper: string[] = [];
  let at = 0;
  for (const run of runs) {
    const cells = columns.slice(at, at + run.columns.length);
    // Group headings stand above the titles of their columns; a column without a group has its title in that line.
    const title = run.title ?? run.columns[0]!.title;
    const own = run.columns.map((_, j) => Math.max(cells[j]!.width, width(titles[at + j]!)));
    const room = own.reduce((sum, w) => sum + w, gap.length * (own.length - 1));
    own[own.length - 1]! += Math.max(0, width(title) - room);
    for (let j = 0; j < own.length; j++) cells[j]!.width = own[j]!;
    const whole = Math.max(room, width(title));
    const left = (run.columns[0]!.align ?? "left") === "left";
    upper.push(left ? padEnd(title, whole) : padStart(title, whole));
    at += run.columns.length;
  }
  const side = (column: Column, text: string, w: number) =>
    (column.align ?? "left") === "left" ? padEnd(text, w) : padStart(text, w);
  const lower = table.columns.map((column, j) => side(column, titles[j]!, columns[j]!.width));
  const lines = [upper.join(gap)];
  if (titles.some((title) => title !== "")) lines.push(lower.join(gap));
  for (let i = 0; i < table.rows.length; i++) {
    lines.push(columns.map(({ texts, width: w }, j) => side(table.columns[j]!, texts[i]!, w)).join(gap));
  }
  return lines.map((line) => line.trimEnd()).join("\n");
}

function aligned(column: Column, texts: readonly string[]): { texts: string[]; width: number } {
  let placed = [...texts];
  if (column.align === "decimal") {
    const parts = texts.map(atPoint);
    const rest = parts.reduce((most, [, after]) => Math.max(most, width(after)), 0);
    placed = parts.map(([before, after]) => before + padEnd(after, rest));
  }
  return { texts: placed, width: placed.reduce((most, text) => Math.max(most, width(text)), 0) };
}
