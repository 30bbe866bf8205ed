import { InputError } from "../../numeric/index.js";
import type { LoadOptions } from "./options.js";
import { RowProblem } from "./problem.js";
import type { RawColumn } from "./raw-table.js";
import { type Cell, columnOfCells } from "./rows.js";

/** Runs one query on a SQLite file, opened read-only. */
export async function readSqlite(path: string, sql: string, options: LoadOptions): Promise<RawColumn[]> {
  const { default: sqlite } = await import("node-sqlite3-wasm");
  const database = new sqlite.Database(path, { readOnly: true });
  try {
    const columns = new Map<string, Cell[]>();
    for (const row of database.prepare(sql).iterate() as IterableIterator<Record<string, unknown>>) {
      if (columns.size === 0) for (const name of Object.keys(row)) columns.set(name, []);
      for (const [name, cells] of columns) cells.push(cellOf(row[name], name, cells.length));
    }
    if (columns.size === 0) throw new InputError(`load: the query on ${path} gives no rows.`);
    return [...columns].map(([name, cells]) => columnOfCells(name, cells, options));
  } catch (error) {
    if (error instanceof InputError || error instanceof RowProblem) throw error;
    throw new InputError(`load: the query on ${path} failed: ${(error as Error).message}.`);
  } finally {
    database.close();
  }
}

function cellOf(value: unknown, name: string, row: number): Cell {
  if (value === null || typeof value !== "object") return value as Cell;
  throw new RowProblem(row, `column ${JSON.stringify(name)}`, "the cell holds bytes, which cannot be read.");
}
