import { isUtf8 } from "node:buffer";
import { open } from "node:fs/promises";
import { InputError } from "../../numeric/index.js";
import { formOf } from "../time/forms.js";
import { records } from "./records.js";

/** How a delimited file is written. */
export interface Dialect {
  readonly delimiter: string;
  readonly encoding: "utf-8" | "latin-1";
  readonly bom: boolean;
  readonly header: readonly string[];
  /** Whether the names were given and the file has no header line. */
  readonly headerless: boolean;
  /** Raw fields of the first rows, header left out. */
  readonly sample: readonly (readonly string[])[];
  /** Whether the sample is the whole file. */
  readonly whole: boolean;
}

const sampleBytes = 262_144;

/** Finds out the dialect of a delimited file from its start. Throws InputError for an empty file or a bad header. */
export async function sniffDialect(
  path: string,
  delimiter?: string,
  names?: readonly string[],
): Promise<Dialect> {
  const { bytes, size } = await readStart(path);
  if (size === 0) throw new InputError(`load: ${path} is empty.`);
  const whole = bytes.length >= size;
  const bom = bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf;
  if ((bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff)) {
    throw new InputError(`load: ${path} is encoded in UTF-16; save it as UTF-8.`);
  }
  const encoding = isUtf8(completeLines(bytes, whole)) ? "utf-8" : "latin-1";
  let text = new TextDecoder(encoding === "utf-8" ? "utf-8" : "windows-1252").decode(bytes);
  if (!whole) text = text.slice(0, Math.max(text.lastIndexOf("\n") + 1, 1));
  const chosen = delimiter ?? guessDelimiter(text);
  const rows = [...records(text, chosen)].map(({ fields }) => fields);
  const header = names ?? rows.shift();
  if (!header) throw new InputError(`load: ${path} has no header and no rows.`);
  checkHeader(path, header);
  return {
    delimiter: chosen,
    encoding,
    bom,
    header,
    headerless: names !== undefined,
    sample: rows.slice(0, 1000),
    whole,
  };
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

function completeLines(bytes: Buffer, whole: boolean): Buffer {
  if (whole) return bytes;
  const end = bytes.lastIndexOf(0x0a);
  return end > 0 ? bytes.subarray(0, end) : bytes;
}

/** The one of , ; tab | that parts the header most often outside quotes. */
function guessDelimiter(text: string): string {
  const counts = [",", ";", "\t", "|"].map((delimiter) => {
    const first = records(text, delimiter).next();
    return { delimiter, count: first.done ? 0 : first.value.fields.length };
  });
  return counts.reduce((best, candidate) => (candidate.count > best.count ? candidate : best)).delimiter;
}

function checkHeader(path: string, header: readonly string[]): void {
  const isData = header.some((name, i) => i > 0 && /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(name.trim()));
  if (
    isData &&
    header.every((name) => /^[+-]?[\d.,]+$/.test(name.trim()) || formOf(name.trim()) || name.trim() === "")
  ) {
    throw new InputError(
      `load: the first line of ${path} looks like data (${header.slice(0, 4).join(", ")}), not like names. ` +
        "Give the columns names in a first line, or say names: [...].",
    );
  }
  const seen = new Set<string>();
  header.forEach((name, i) => {
    if (name === "") throw new InputError(`load: column ${i + 1} of ${path} has no name.`);
    if (seen.has(name)) {
      throw new InputError(
        `load: ${path} has two columns called ${JSON.stringify(name)} (one is column ${i + 1}). Rename one in the file.`,
      );
    }
    seen.add(name);
  });
}
