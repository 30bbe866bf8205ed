import { InputError } from "../../../numeric/index.js";
import type { Remark } from "../../result.js";
import { withDuckDB } from "../duckdb.js";
import { type LoadOptions, missingTexts } from "../options.js";
import type { RawColumn } from "../raw-table.js";
import { type Dialect, sniffDialect } from "./dialect.js";
import { isPlain, readCsv, readFast } from "./fast.js";
import { type Kinds, kindsOf } from "./kinds.js";
import { countMarkers } from "./markers.js";
import { blankLinesOf, lineOfRow, lineOfZeroByte } from "./places.js";
import { type Scan, scan } from "./scan.js";
import { type DelimitedContent, readStrictly } from "./strict.js";
import { told } from "./told.js";

/** A delimited file as it was read. */
export interface Delimited {
  readonly columns: readonly RawColumn[];
  readonly findings: readonly Remark[];
  readonly fingerprint: string;
  /** The line on which a data row (0-based) starts. */
  readonly lineOf: (row: number) => Promise<number | undefined>;
}

/** Called with the rows read so far and, where it can be told, about how many there are. */
export type OnRows = (rows: number, about?: number) => void;

/** Files below this size are read cell by cell, which takes less time than starting DuckDB. */
const smallBytes = 4_000_000;

/**
 * Reads a delimited file (commas, semicolons, tabs, vertical bars), every cell checked. Throws InputError for what is
 * wrong with the file as a whole, RowProblem for a row that cannot be taken.
 */
export async function readDelimited(path: string, options: LoadOptions, onRows: OnRows): Promise<Delimited> {
  const dialect = await sniffDialect(path, options);
  const about = Math.round(dialect.size / dialect.rowBytes);
  const scanned = scan(path);
  scanned.catch(() => {}); // awaited below, unless the reading fails first
  const read = await readEither(path, dialect, options, scanned, (rows) =>
    onRows(rows, Math.max(rows, about)),
  );
  const { fingerprint } = await scanned;
  return {
    columns: read.content.columns,
    findings: told(read.dialect, read.kinds.style, read.content),
    fingerprint,
    lineOf: (row) => lineOfRow(path, read.dialect, options, row),
  };
}

interface Read {
  readonly content: DelimitedContent;
  readonly dialect: Dialect;
  readonly kinds: Kinds;
}

async function readEither(
  path: string,
  dialect: Dialect,
  options: LoadOptions,
  scanned: Promise<Scan>,
  onRows: (rows: number) => void,
): Promise<Read> {
  const kinds = knownKinds(path, dialect, options);
  const fast =
    dialect.size >= smallBytes && isPlain(dialect, kinds)
      ? await readFast(path, dialect, kinds, options, onRows).catch(() => undefined)
      : undefined;
  const facts = await scanned;
  if (facts.zeroBytes && !dialect.encoding.startsWith("utf-16")) {
    throw new InputError(
      `load: ${path} holds a zero byte in line ${await lineOfZeroByte(path)}, which no text has. Mend the file, or see whether it is text at all.`,
    );
  }
  if (!facts.utf8 && dialect.encoding === "utf-8") {
    // What is not UTF-8 comes after the part of the file that was looked at first.
    const other = await sniffDialect(path, options, "windows-1252");
    return strictly(path, other, knownKinds(path, other, options), options, onRows);
  }
  if (!fast || (facts.underscores && (await hasUnderscore(path, dialect, kinds, options)))) {
    return strictly(path, dialect, kinds, options, onRows);
  }
  const blank = facts.blankLines ? await blankLinesOf(path, options.skip ?? 0) : { count: 0, first: 0 };
  const markers = await countMarkers(path, dialect, kinds, options, fast);
  const content = { columns: fast, markers, blankLines: blank.count, firstBlank: blank.first };
  return { content, dialect, kinds };
}

function knownKinds(path: string, dialect: Dialect, options: LoadOptions): Kinds {
  if (dialect.sample.length === 0) throw new InputError(`load: ${path} has a header but no rows.`);
  return kindsOf(dialect, options, missingTexts(options), path);
}

async function strictly(
  path: string,
  dialect: Dialect,
  kinds: Kinds,
  options: LoadOptions,
  onRows: (rows: number) => void,
): Promise<Read> {
  return { content: await readStrictly(path, dialect, kinds, options, onRows), dialect, kinds };
}

/** Whether a cell in a column of numbers holds an underscore, which DuckDB passes over. */
async function hasUnderscore(
  path: string,
  dialect: Dialect,
  { kinds, style }: Kinds,
  options: LoadOptions,
): Promise<boolean> {
  const suspects = kinds.flatMap((kind, i) => (kind === "number" ? [`contains(c${i}, '_')`] : []));
  if (suspects.length === 0) return false;
  const texts = kinds.map(() => "VARCHAR");
  const rows = `SELECT 1 FROM ${readCsv(path, dialect, texts, style.decimal, options)} WHERE ${suspects.join(" OR ")} LIMIT 1`;
  return withDuckDB(async (connection) => (await connection.runAndReadAll(rows)).currentRowCount > 0);
}
