import { isUtf8 } from "node:buffer";
import { open } from "node:fs/promises";
import { InputError } from "../../../numeric/index.js";
import { formOf } from "../../time/forms.js";
import type { LoadOptions } from "../options.js";
import { type RawRecord, records } from "./records.js";
import { Decoder, type Encoding } from "./text-source.js";

/** How a delimited file is written. */
export interface Dialect {
  readonly delimiter: string;
  readonly encoding: Encoding;
  readonly header: readonly string[];
  /** Whether the file has no header line: the names were given. */
  readonly headerless: boolean;
  /** Raw fields of the first rows, header left out. */
  readonly sample: readonly (readonly string[])[];
  /** Mean number of bytes in a row of the sample. */
  readonly rowBytes: number;
  /** Bytes in the file. */
  readonly size: number;
}

const sampleBytes = 262_144;

/** Finds out the dialect of a delimited file from its start. Throws InputError for an empty file or a bad header. */
export async function sniffDialect(
  path: string,
  options: LoadOptions,
  encoding?: Encoding,
): Promise<Dialect> {
  const { bytes, size } = await readStart(path);
  if (size === 0) throw new InputError(`load: ${path} is empty.`);
  requireText(path, bytes);
  const whole = bytes.length >= size;
  const written = encoding ?? encodingOf(bytes, whole);
  let text = withoutLines(new Decoder(written).piece(bytes), options.skip ?? 0);
  if (!whole) text = text.slice(0, Math.max(text.lastIndexOf("\n") + 1, 1));
  const delimiter = options.delimiter ?? guessDelimiter(text, options.time);
  const rows = [...records(text, delimiter)];
  // The last record of a cut text may be the start of one with a newline in quotes.
  if (!whole && rows[rows.length - 1]?.fault) rows.pop();
  const count = rows.length;
  const header = options.names ?? withoutEnd(rows.shift()?.fields, rows);
  if (!header) throw new InputError(`load: ${path} has no header and no rows.`);
  checkHeader(path, header, options);
  return {
    delimiter,
    encoding: written,
    header,
    headerless: options.names !== undefined,
    sample: rows.slice(0, 1000).map(({ fields }) => fields),
    rowBytes: Math.max(1, Math.min(bytes.length, size) / Math.max(1, count)),
    size,
  };
}

/** The header, less an empty last name when every line ends with a delimiter. */
function withoutEnd(header: string[] | undefined, rows: readonly RawRecord[]): string[] | undefined {
  if (!header || header.length < 2 || header[header.length - 1] !== "") return header;
  const ended = rows.every(({ fields }) => fields.length < header.length || fields[header.length - 1] === "");
  return ended ? header.slice(0, -1) : header;
}

async function readStart(path: string): Promise<{ bytes: Buffer; size: number }> {
  const file = await open(path);
  try {
    const { size } = await file.stat();
    const bytes = Buffer.alloc(Math.min(size, sampleBytes));
    await file.read(bytes, 0, bytes.length, 0);
    return { bytes, size };
  } finally {
    await file.close();
  }
}

/** What other files begin with, and what to do with them. */
const others: readonly (readonly [start: string, what: string])[] = [
  ["\x1f\x8b", "packed with gzip; unpack it first"],
  ["PK\x03\x04", "a zip archive or a workbook; unpack it, or end its name in .xlsx"],
  ["PAR1", "a Parquet file; end its name in .parquet"],
  ["ARROW1", "an Arrow file; end its name in .arrow"],
  ["SQLite format 3", "a SQLite file; give a query, as in load({ database, sql }, ...)"],
  ["%PDF-", "a PDF, which holds no table that can be read"],
];

function requireText(path: string, bytes: Buffer): void {
  const start = bytes.toString("latin1", 0, 16);
  const other = others.find(([magic]) => start.startsWith(magic));
  if (other) throw new InputError(`load: ${path} is ${other[1]}.`);
}

function encodingOf(bytes: Buffer, whole: boolean): Encoding {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return "utf-16le";
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return "utf-16be";
  const end = whole ? bytes.length : bytes.lastIndexOf(0x0a) + 1 || bytes.length;
  return isUtf8(bytes.subarray(0, end)) ? "utf-8" : "windows-1252";
}

function withoutLines(text: string, count: number): string {
  let rest = text;
  for (let i = 0; i < count; i++) rest = rest.slice(rest.indexOf("\n") + 1 || rest.length);
  return rest;
}

/**
 * The one of , ; tab | that parts the most records into one number of fields, the time column among them; failing
 * that, the one that parts the header most often.
 */
function guessDelimiter(text: string, time: string): string {
  const head = text.slice(0, 65_536);
  const found = [",", ";", "\t", "|"].map((delimiter) => {
    const counts: number[] = [];
    let named = false;
    for (const { fields } of records(head, delimiter)) {
      if (counts.length === 0) named = fields.includes(time);
      if (counts.push(fields.length) >= 100) break;
    }
    const count = counts[0] ?? 0;
    const alike = counts.filter((other) => other === count).length / Math.max(1, counts.length);
    return { delimiter, rank: (count > 1 && alike >= 0.9 ? 2e6 : 0) + (named ? 1e6 : 0) + count };
  });
  return found.reduce((best, candidate) => (candidate.rank > best.rank ? candidate : best)).delimiter;
}

function checkHeader(path: string, header: readonly string[], options: LoadOptions): void {
  const isData = header.some((name, i) => i > 0 && /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(name.trim()));
  if (
    isData &&
    !options.names &&
    header.every((name) => /^[+-]?[\d.,]+$/.test(name.trim()) || formOf(name.trim()) || name.trim() === "")
  ) {
    throw new InputError(
      `load: the first line of ${path} looks like data (${header.slice(0, 4).join(", ")}), not like names. ` +
        "Give the columns names in a first line, or say names: [...].",
    );
  }
  if (header.length === 1 && header[0] !== options.time) {
    throw new InputError(
      `load: ${path} has one column, called ${JSON.stringify(header[0]!.slice(0, 100))}. If the columns are parted by ` +
        'something other than , ; | or a tab, say so, as in delimiter: " ".',
    );
  }
  const seen = new Map<string, number>();
  header.forEach((name, i) => {
    if (name === "") throw new InputError(`load: column ${i + 1} of ${path} has no name.`);
    const before = seen.get(name);
    if (before !== undefined) {
      throw new InputError(
        `load: ${path} has two columns called ${JSON.stringify(name)} (columns ${before + 1} and ${i + 1}). Rename one in the file.`,
      );
    }
    seen.set(name, i);
  });
}
