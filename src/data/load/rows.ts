import { InputError } from "../../numeric/index.js";
import { type LoadOptions, missingTexts } from "./options.js";
import { RowProblem } from "./problem.js";
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
  const columns = names.map((name) =>
    columnOfCells(
      name,
      rows.map((row) => row[name]),
      options,
    ),
  );
  return { columns, findings: [], description: "rows" };
}

/**
 * Makes one column of cells of mixed origin; the kind of the first cell that is not missing decides. Throws RowProblem
 * for a cell of another kind, and for a whole number too large for a double. `dates` says what a Date stands for.
 */
export function columnOfCells(
  name: string,
  cells: readonly Cell[],
  options: LoadOptions,
  dates: "instants" | "wall times" = "instants",
): RawColumn {
  const missing = missingTexts(options);
  const isMissing = (cell: Cell) =>
    cell === null ||
    cell === undefined ||
    (typeof cell === "number" && Number.isNaN(cell)) ||
    (typeof cell === "string" && missing.has(cell.trim()));
  const where = `column ${JSON.stringify(name)}`;
  const first = cells.find((cell) => !isMissing(cell));
  if (first instanceof Date) return columnOfDates(name, cells, isMissing, dates);
  const isTime = name === options.time;
  if (typeof first === "string" || options.text?.includes(name) || (isTime && typeof first !== "number")) {
    const values = cells.map((cell, row) => {
      if (isMissing(cell)) return null;
      if (typeof cell === "object")
        throw new RowProblem(row, where, "the cell is no text, though those before are.");
      return String(cell);
    });
    return { name, kind: "text", values };
  }
  const values = Float64Array.from(cells, (cell, row) => {
    if (isMissing(cell)) return Number.NaN;
    if (typeof cell === "bigint" && Number.isInteger(Number(cell)) && BigInt(Number(cell)) !== cell) {
      throw new RowProblem(
        row,
        where,
        `${cell} has more digits than a double holds. Take fewer, or keep it as text.`,
      );
    }
    if (typeof cell === "number" || typeof cell === "bigint") return Number(cell);
    if (typeof cell === "boolean" && typeof first === "boolean") return cell ? 1 : 0;
    throw new RowProblem(
      row,
      where,
      `${shown(cell)} is not a number, but the cells before are. ` +
        `Name it in missing: [${shown(cell)}, ...] if it stands for a missing value, or keep the column as text with text: [${JSON.stringify(name)}].`,
    );
  });
  return { name, kind: typeof first === "boolean" ? "boolean" : "number", values };
}

function shown(cell: Cell): string {
  return cell instanceof Date ? cell.toISOString() : (JSON.stringify(cell) ?? String(cell));
}

/** Dates are days when all of them are midnights in UTC, and instants otherwise. */
function columnOfDates(
  name: string,
  cells: readonly Cell[],
  isMissing: (cell: Cell) => boolean,
  dates: "instants" | "wall times",
): RawColumn {
  const values = Float64Array.from(cells, (cell, row) => {
    if (isMissing(cell)) return Number.NaN;
    if (cell instanceof Date && !Number.isNaN(cell.getTime())) return cell.getTime();
    throw new RowProblem(
      row,
      `column ${JSON.stringify(name)}`,
      `${cell} is no date, though the cells before are.`,
    );
  });
  const days = values.every((value) => Number.isNaN(value) || value % 86_400_000 === 0);
  return {
    name,
    kind: "instant",
    values,
    form: days ? "date" : "date-time",
    offset: !days && dates === "instants",
  };
}
