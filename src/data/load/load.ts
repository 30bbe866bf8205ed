import { createHash } from "node:crypto";
import { createReadStream, existsSync, statSync } from "node:fs";
import { open, readdir } from "node:fs/promises";
import { basename, dirname, extname } from "node:path";
import { InputError } from "../../numeric/index.js";
import { suggestion } from "../nearest.js";
import { reportProgress } from "../progress.js";
import type { Remark } from "../result.js";
import type { TimeTable } from "../table.js";
import { readArrow } from "./arrow.js";
import { readDelimited } from "./delimited.js";
import { collect, literal, withDuckDB } from "./duckdb.js";
import type { LoadOptions } from "./options.js";
import type { RawColumn } from "./raw-table.js";
import { type Cell, fromRows } from "./rows.js";
import { readSqlite } from "./sqlite.js";
import { tabulate } from "./tabulate.js";
import { readWorkbook } from "./workbook.js";

/** A file, a query on a DuckDB or SQLite file, or an array of rows. */
export type LoadSource =
  | string
  | { readonly database: string; readonly sql: string }
  | readonly Readonly<Record<string, Cell>>[];

/**
 * Loads time-ordered data: delimited text (.csv, .tsv, .txt), JSON lines (.jsonl, .ndjson, .json), .parquet, Arrow IPC
 * (.arrow, .feather), Excel (.xlsx), a query on a database file, or an array of rows. `time` names the time column;
 * its step is inferred, or stated with `every`. Unsorted and doubled rows are findings of the table, and whatever
 * needs the order of time refuses them; nothing is dropped, sorted or filled here. Throws InputError naming the row,
 * line and column of whatever cannot be read.
 */
export async function load(source: LoadSource, options: LoadOptions): Promise<TimeTable> {
  if (!options?.time)
    throw new InputError('load: say which column holds the time, as in load("file.csv", { time: "week" }).');
  if (Array.isArray(source)) return tabulate(fromRows(source, options), options);
  if (typeof source === "object" && "database" in source) return loadQuery(source, options);
  if (typeof source !== "string")
    throw new InputError("load: the source is a file, { database, sql } or an array of rows.");
  await requireFile(source);
  const progress = reportProgress(`load ${basename(source)}`, "rows");
  let rows = 0;
  const onRows = (count: number) => {
    rows = count;
    progress.at(count);
  };
  try {
    const [{ columns, findings }, fingerprint] = await Promise.all([
      read(source, options, onRows),
      fileFingerprint(source),
    ]);
    return tabulate({ columns, findings, description: source, fingerprint }, options);
  } finally {
    progress.end(rows);
  }
}

type Read = { columns: readonly RawColumn[]; findings: readonly Remark[] };

async function read(path: string, options: LoadOptions, onRows: (rows: number) => void): Promise<Read> {
  const ending = extname(path).toLowerCase();
  const reader = readers[ending];
  if (reader) return { columns: await reader(path, options, onRows), findings: [] };
  if (databases.includes(ending)) {
    throw new InputError(
      `load: ${path} is a database; give a query: load({ database: ${JSON.stringify(path)}, sql: "select ..." }, ...).`,
    );
  }
  return readDelimited(path, options, onRows);
}

const databases = [".duckdb", ".db", ".sqlite", ".sqlite3"];

type Reader = (path: string, options: LoadOptions, onRows: (rows: number) => void) => Promise<RawColumn[]>;

const byDuckDB =
  (call: string): Reader =>
  (path, _options, onRows) =>
    withDuckDB((connection) => collect(connection, `SELECT * FROM ${call}(${literal(path)})`, onRows)).catch(
      (error) => {
        throw new InputError(`load: ${path} cannot be read: ${(error as Error).message.split("\n")[0]}.`);
      },
    );

const readers: Readonly<Record<string, Reader>> = {
  ".parquet": byDuckDB("read_parquet"),
  ".json": byDuckDB("read_json_auto"),
  ".jsonl": byDuckDB("read_json_auto"),
  ".ndjson": byDuckDB("read_json_auto"),
  ".arrow": readArrow,
  ".feather": readArrow,
  ".ipc": readArrow,
  ".xlsx": readWorkbook,
};

async function loadQuery(
  source: { database: string; sql: string },
  options: LoadOptions,
): Promise<TimeTable> {
  await requireFile(source.database);
  const description = `${source.database} (${source.sql})`;
  const columns = (await isSqlite(source.database))
    ? await readSqlite(source.database, source.sql, options)
    : await withDuckDB(
        (connection) => collect(connection, source.sql.replace(/;\s*$/, "")),
        source.database,
      ).catch((error) => {
        throw new InputError(
          `load: the query on ${source.database} failed: ${(error as Error).message.split("\n")[0]}.`,
        );
      });
  return tabulate(
    { columns, findings: [], description, fingerprint: await fileFingerprint(source.database) },
    options,
  );
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

async function requireFile(path: string): Promise<void> {
  if (existsSync(path)) {
    if (statSync(path).isFile()) return;
    throw new InputError(`load: ${path} is a folder, not a file.`);
  }
  const folder = dirname(path);
  const names = existsSync(folder) ? (await readdir(folder)).filter((name) => !name.startsWith(".")) : [];
  const hint = names.length > 0 ? suggestion(basename(path), names) : ` There is no folder ${folder} either.`;
  throw new InputError(`load: there is no file ${path} (looked in ${process.cwd()}).${hint}`);
}

async function fileFingerprint(path: string): Promise<string> {
  const hash = createHash("sha256");
  for await (const chunk of createReadStream(path)) hash.update(chunk as Buffer);
  return hash.digest("hex");
}
