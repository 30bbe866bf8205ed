import { createReadStream } from "node:fs";
import type { LoadOptions } from "../options.js";
import type { Dialect } from "./dialect.js";
import { RecordSplitter } from "./records.js";
import { textOf } from "./text-source.js";

/** The line (1-based) on which a data row (0-based) of a delimited file starts; undefined past its end. */
export async function lineOfRow(
  path: string,
  dialect: Dialect,
  options: LoadOptions,
  row: number,
): Promise<number | undefined> {
  const skip = options.skip ?? 0;
  const splitter = new RecordSplitter(dialect.delimiter, skip + 1);
  let left = dialect.headerless ? row : row + 1;
  for await (const piece of textOf(path, dialect.encoding, skip)) {
    for (const record of splitter.push(piece, false)) if (left-- === 0) return record.line;
  }
  for (const record of splitter.push("", true)) if (left-- === 0) return record.line;
  return undefined;
}

/** The line (1-based) of the first zero byte. */
export async function lineOfZeroByte(path: string): Promise<number> {
  let line = 1;
  for await (const chunk of createReadStream(path, { highWaterMark: 1 << 20 })) {
    for (const byte of chunk as Buffer) {
      if (byte === 0) return line;
      if (byte === 0x0a) line++;
    }
  }
  return line;
}

/** How many lines between records are blank, and the first of them (1-based). Blank lines in quotes do not count. */
export async function blankLinesOf(path: string, skip: number): Promise<{ count: number; first: number }> {
  let [line, count, first] = [1, 0, 0];
  let quoted = false;
  let blankSoFar = true;
  let waiting: number[] = [];
  let previous = 0;
  for await (const chunk of createReadStream(path, { highWaterMark: 1 << 20 })) {
    for (const byte of chunk as Buffer) {
      const ends = byte === 0x0a || byte === 0x0d;
      if (byte === 0x0a && previous === 0x0d) {
        previous = byte; // the second half of one line end
        continue;
      }
      previous = byte;
      if (byte === 0x22) quoted = !quoted;
      if (!ends) {
        blankSoFar = false;
        if (waiting.length > 0) {
          if (count === 0) first = waiting[0]!;
          count += waiting.length;
          waiting = [];
        }
        continue;
      }
      if (blankSoFar && !quoted && line > skip) waiting.push(line);
      blankSoFar = true;
      line++;
    }
  }
  return { count, first };
}
