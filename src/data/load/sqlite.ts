import { InputError } from "../../numeric/index.js";
import type { LoadOptions } from "./options.js";
import type { RawColumn } from "./raw-table.js";
import { type Cell, columnOfCells } from "./rows.js";

/** Runs one query on a SQLite file, opened read-only. */
export async function readSqlite(path: string, sql: string, options: LoadOptions): Promise<RawColumn[]> {
  const { default: sqlite } = await import("node-sqlite3-wasm");
  const database = new sqlite.Database(path, { readOnly: true });
  try {
    const rows = database.all(sql) as Record<string, Cell>[];
    if (rows.length === 0) throw new InputError(`load: the query on ${path} gives no rows.`);
    return Object.keys(rows[0]!).map((name) =>
      columnOfCells(
        name,
        rows.map((row) => row[name]),
        options,
      ),
    );
  } catch (error) {
    if (error instanceof InputError) throw error;
    throw new InputError(`load: the query on ${path} failed: ${(error as Error).message}.`);
  } finally {
    database.close();
  }
}
