import { InputError } from "../../numeric/index.js";
import type { Remark } from "../result.js";
import type { LoadOptions } from "./options.js";
import { RowProblem } from "./problem.js";
import type { RawColumn } from "./raw-table.js";
import { type Cell, columnOfCells } from "./rows.js";

/** One sheet as it was read. */
export interface Sheet {
  readonly columns: readonly RawColumn[];
  readonly findings: readonly Remark[];
  /** The row of the sheet (1-based) in which a data row (0-based) stands. */
  readonly lineOf: (row: number) => number | undefined;
}

/** Reads one sheet of an Excel workbook (.xlsx): the first row, after `skip` others, names the columns. */
export async function readWorkbook(path: string, options: LoadOptions): Promise<Sheet> {
  const { default: readSheets } = await import("read-excel-file/node");
  let sheets: { sheet: string; data: Cell[][] }[];
  try {
    sheets = (await readSheets(path)) as unknown as typeof sheets;
  } catch (error) {
    throw new InputError(`load: ${path} cannot be read as a workbook: ${(error as Error).message}.`);
  }
  const wanted = options.sheet ?? 1;
  const found =
    typeof wanted === "number" ? sheets[wanted - 1] : sheets.find(({ sheet }) => sheet === wanted);
  if (!found) {
    const names = sheets.map(({ sheet }) => JSON.stringify(sheet)).join(", ");
    throw new InputError(`load: ${path} has no sheet ${JSON.stringify(wanted)}. There are: ${names}.`);
  }
  const skip = options.skip ?? 0;
  const where = `sheet ${JSON.stringify(found.sheet)} of ${path}`;
  const header = found.data[skip];
  const numbered = found.data.map((cells, i) => ({ cells, line: i + 1 })).slice(skip + 1);
  while (numbered.length > 0 && isBlank(numbered[numbered.length - 1]!.cells)) numbered.pop();
  const rows = numbered.filter(({ cells }) => !isBlank(cells));
  if (!header || rows.length === 0) throw new InputError(`load: ${where} has no rows.`);
  const lineOf = (row: number) => rows[row]?.line;
  const columns = namesOf(header, where).map((name, c) => {
    const cells = rows.map((row) => wholeSecond(row.cells[c]));
    try {
      return columnOfCells(name, cells, options, "wall times");
    } catch (error) {
      if (!(error instanceof RowProblem)) throw error;
      throw new RowProblem(error.row, error.where, error.said, lineOf(error.row));
    }
  });
  const blank = numbered.length - rows.length;
  const text = `${blank} blank ${blank === 1 ? "row was" : "rows were"} passed over`;
  return {
    columns,
    findings: blank > 0 ? [{ severity: "note", text }] : [],
    lineOf,
  };
}

function isBlank(cells: readonly Cell[]): boolean {
  return cells.every((cell) => cell === null || cell === undefined || cell === "");
}

function namesOf(header: readonly Cell[], where: string): string[] {
  const names = header.map((cell, i) => {
    if (cell === null || cell === undefined || cell === "") {
      throw new InputError(
        `load: column ${i + 1} of ${where} has no name. If the names stand further down, say how many rows to pass over, as in skip: 2.`,
      );
    }
    return cell instanceof Date ? cell.toISOString().slice(0, 10) : String(cell);
  });
  const twice = names.find((name, i) => names.indexOf(name) !== i);
  if (twice !== undefined) {
    throw new InputError(`load: ${where} has two columns called ${JSON.stringify(twice)}.`);
  }
  return names;
}

/** A workbook holds times as fractions of a day, so 01:00:00 may come out as 00:59:59.999. */
function wholeSecond(cell: Cell): Cell {
  if (!(cell instanceof Date)) return cell;
  const at = cell.getTime();
  const second = Math.round(at / 1000) * 1000;
  return Math.abs(at - second) <= 2 ? new Date(second) : cell;
}
