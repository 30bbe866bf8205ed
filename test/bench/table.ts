/** What one bench prints. */
export interface Table {
  readonly title: string;
  /** Columns' heads, the first for the row's name. */
  readonly heads: readonly string[];
  readonly rows: readonly (readonly string[])[];
  readonly notes?: readonly string[];
}

/** The table as lines of text, numbers to the right. */
export function printed({ title, heads, rows, notes = [] }: Table): string {
  const widths = heads.map((head, i) => Math.max(head.length, ...rows.map((row) => (row[i] ?? "").length)));
  const line = (cells: readonly string[]): string =>
    cells.map((cell, i) => (i === 0 ? cell.padEnd(widths[i]!) : cell.padStart(widths[i]!))).join("  ");
  const rule = widths.map((width) => "-".repeat(width)).join("  ");
  return [title, line(heads), rule, ...rows.map(line), ...notes, ""].join("\n");
}

/** Seconds in a unit that reads well. */
export function duration(seconds: number): string {
  if (seconds >= 1) return `${seconds.toFixed(2)} s`;
  return `${(seconds * 1000).toPrecision(3)} ms`;
}

/** How many times as long the other takes. */
export function ratio(other: number, ours: number): string {
  const value = other / ours;
  return `${value >= 100 ? value.toFixed(0) : value.toPrecision(3)}×`;
}
