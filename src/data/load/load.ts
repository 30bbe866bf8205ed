import { basename, extname } from "node:path";
import { InputError } from "../../numeric/index.js";
import { reportProgress } from "../progress.js";
import type { TimeTable } from "../table.js";
import { readArrow } from "./arrow.js";
import { loadQuery } from "./database.js";
import { type OnRows, readDelimited } from "./delimited/delimited.js";
import { fileFingerprint, requireFile } from "./file.js";
import { readJson } from "./json.js";
import type { LoadOptions } from "./options.js";
import { readParquet } from "./parquet.js";
import { placed, RowProblem } from "./problem.js";
import type { RawColumn, RawTable } from "./raw-table.js";
import { type Cell, fromRows } from "./rows.js";
import { tabulate } from "./tabulate.js";
import { readWorkbook, type Sheet } from "./workbook.js";

/** A file, a query on a DuckDB or SQLite file, or an array of rows. */
export type LoadSource =
  | string
  | { readonly database: string; readonly sql: string }
  | readonly Readonly<Record<string, Cell>>[];

/**
 * Loads time-ordered data: delimited text (.csv, .tsv, .txt), JSON lines (.jsonl, .ndjson, .json), .parquet, Arrow IPC
 * (.arrow, .feather), Excel (.xlsx), a query on a database file, or an array of rows. `time` names the time column;
 * its step is inferred, or stated with `every`. Rows that are not in order of time, and several rows for one period,
 * are refused unless `sort`, `dedupe` or `asFound` says what to do with them; gaps and missing values are findings.
 * Throws InputError naming the file, row, line and column of whatever cannot be read.
 */
export async function load(source: LoadSource, options: LoadOptions): Promise<TimeTable> {
  if (!options?.time) {
    throw new InputError('load: say which column holds the time, as in load("file.csv", { time: "week" }).');
  }
  if (typeof source === "string") return loadFile(source, options);
  if (Array.isArray(source)) return tabulated(() => fromRows(source, options), "the array", options);
  if (typeof source === "object" && source !== null && "database" in source) {
    return tabulated(() => loadQuery(source, options), `the query on ${source.database}`, options);
  }
  throw new InputError("load: the source is a file, { database, sql } or an array of rows.");
}

async function loadFile(path: string, options: LoadOptions): Promise<TimeTable> {
  await requireFile(path);
  const progress = reportProgress(`load ${basename(path)}`, "rows");
  let rows = 0;
  const onRows: OnRows = (count, about) => {
    rows = count;
    progress.at(count, about);
  };
  try {
    let lineOf: ((row: number) => Promise<number | undefined>) | undefined;
    const read = async (): Promise<RawTable> => {
      const reader = readerOf(path);
      if (!reader) {
        const { columns, findings, fingerprint, lineOf: line } = await readDelimited(path, options, onRows);
        lineOf = line;
        return { columns, findings, description: path, fingerprint };
      }
      const [content, fingerprint] = await Promise.all([
        reader(path, options, onRows),
        fileFingerprint(path),
      ]);
      if (Array.isArray(content)) return { columns: content, findings: [], description: path, fingerprint };
      lineOf = async (row) => content.lineOf(row);
      return { ...content, description: path, fingerprint };
    };
    return await tabulated(read, path, options, (row) => lineOf?.(row));
  } finally {
    progress.end(rows);
  }
}

/** The table of what `read` gives; a problem with a row is told with its place. */
async function tabulated(
  read: () => RawTable | Promise<RawTable>,
  description: string,
  options: LoadOptions,
  lineOf?: (row: number) => Promise<number | undefined> | undefined,
): Promise<TimeTable> {
  try {
    return tabulate(await read(), options);
  } catch (error) {
    if (error instanceof RowProblem) {
      throw placed(error, description, error.line ?? (await lineOf?.(error.row)));
    }
    throw error;
  }
}

const databases = [".duckdb", ".db", ".sqlite", ".sqlite3"];

type Reader = (path: string, options: LoadOptions, onRows: OnRows) => Promise<RawColumn[] | Sheet>;

const readers: Readonly<Record<string, Reader>> = {
  ".parquet": readParquet,
  ".json": readJson,
  ".jsonl": readJson,
  ".ndjson": readJson,
  ".arrow": readArrow,
  ".feather": readArrow,
  ".ipc": readArrow,
  ".xlsx": readWorkbook,
};

/** The reader for a file's ending; undefined for delimited text. */
function readerOf(path: string): Reader | undefined {
  const ending = extname(path).toLowerCase();
  if (databases.includes(ending)) {
    throw new InputError(
      `load: ${path} is a database; give a query: load({ database: ${JSON.stringify(path)}, sql: "select ..." }, ...).`,
    );
  }
  if (ending === ".xls" || ending === ".ods") {
    throw new InputError(`load: ${path}: ${ending} files cannot be read; save it as .xlsx or .csv.`);
  }
  return readers[ending];
}
