import { open } from "node:fs/promises";
import { InputError } from "../../numeric/index.js";
import { collect, said, withDuckDB } from "./duckdb.js";
import { fileFingerprint, requireFile } from "./file.js";
import type { LoadOptions } from "./options.js";
import type { RawTable } from "./raw-table.js";
import { readSqlite } from "./sqlite.js";

/** What one query on a DuckDB or SQLite file gives; the file is opened read-only. */
export async function loadQuery(
  source: { readonly database: string; readonly sql: string },
  options: LoadOptions,
): Promise<RawTable> {
  const { database, sql } = source;
  if (typeof sql !== "string" || sql.trim() === "") {
    throw new InputError('load: say what to take from the database, as in sql: "select * from weeks".');
  }
  await requireFile(database);
  const columns = (await isSqlite(database))
    ? await readSqlite(database, sql, options)
    : await withDuckDB(
        (connection) => collect(connection, sql.replace(/;\s*$/, ""), options),
        database,
      ).catch((error) => {
        if (error instanceof InputError) throw error;
        throw new InputError(`load: the query on ${database} failed: ${said(error)}.`);
      });
  const description = `${database} (${sql})`;
  return { columns, findings: [], description, fingerprint: await fileFingerprint(database) };
}

async function isSqlite(path: string): Promise<boolean> {
  const file = await open(path);
  try {
    const { buffer } = await file.read(Buffer.alloc(15), 0, 15, 0);
    return buffer.toString("latin1") === "SQLite format 3";
  } finally {
    await file.close();
  }
}
