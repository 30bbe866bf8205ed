import { InputError } from "../../numeric/index.js";
import { type LoadOptions, usualMissing } from "./options.js";
import type { RawColumn, RawTable } from "./raw-table.js";

/** A cell of an array of rows. */
export type Cell = number | string | boolean | Date | bigint | null | undefined;

/** An array of rows as a raw table; every row must have the same columns. */
export function fromRows(rows: readonly Readonly<Record<string, Cell>>[], options: LoadOptions): RawTable {
  if (rows.length === 0) throw new InputError("load: the array has no rows.");
  const names = Object.keys(rows[0]!);
  rows.forEach((row, i) => {
    const extra = Object.keys(row).find((name) => !names.includes(name));
    if (extra !== undefined) {
      throw new InputError(`load: row ${i + 1} has a column ${JSON.stringify(extra)} that row 1 has not.`);
    }
  });
  const missing = options.missing ?? usualMissing;
  const columns = names.map((name) =>
    columnOfCells(
      name,
      rows.map((row) => row[name]),
      missing,
      options,
    ),
  );
  return { columns, findings: [], description: "rows" };
}

/** Makes one column of cells of mixed origin; the kind of the first cell that is not missing decides. */
export function columnOfCells(
  name: string,
  cells: readonly Cell[],
  missing: readonly string[],
  options: LoadOptions,
): RawColumn {
  const isMissing = (cell: Cell) =>
    cell === null ||
    cell === undefined ||
    (typeof cell === "number" && Number.isNaN(cell)) ||
    (typeof cell === "string" && missing.includes(cell.trim()));
  const first = cells.find((cell) => !isMissing(cell));
  const asText = (cell: Cell) => (cell instanceof Date ? dateText(cell) : String(cell));
  if (
    typeof first === "string" ||
    first instanceof Date ||
    name === options.time ||
    options.text?.includes(name)
  ) {
    return { name, kind: "text", values: cells.map((cell) => (isMissing(cell) ? null : asText(cell))) };
  }
  const values = Float64Array.from(cells, (cell, i) => {
    if (isMissing(cell)) return Number.NaN;
    if (typeof cell === "number" || typeof cell === "boolean" || typeof cell === "bigint")
      return Number(cell);
    throw new InputError(
      `load: row ${i + 1}, column ${JSON.stringify(name)}: ${JSON.stringify(asText(cell))} is not a number, but the cells before are.`,
    );
  });
  return { name, kind: typeof first === "boolean" ? "boolean" : "number", values };
}

/** A Date as an ISO date where it is midnight in UTC, and as a date-time with offset otherwise. */
function dateText(date: Date): string {
  const text = date.toISOString();
  return text.endsWith("T00:00:00.000Z") ? text.slice(0, 10) : text;
}
