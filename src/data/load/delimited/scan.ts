import { isUtf8 } from "node:buffer";
import { createHash } from "node:crypto";
import { open } from "node:fs/promises";

/** What the bytes of a text file show at one reading. */
export interface Scan {
  /** SHA-256 of the bytes, in hexadecimal. */
  readonly fingerprint: string;
  readonly utf8: boolean;
  /** Whether there may be blank lines before the end (within quotes counts too). */
  readonly blankLines: boolean;
  /** Whether there is an underscore after the first line: DuckDB takes 1_000 for a number. */
  readonly underscores: boolean;
  /** Whether there is a zero byte, which no text has. */
  readonly zeroBytes: boolean;
}

/** Reads a file once for its fingerprint and for what its reader must know. */
export async function scan(path: string): Promise<Scan> {
  const hash = createHash("sha256");
  let utf8 = true;
  let unfinished: Buffer = Buffer.alloc(0);
  let blankLines = false;
  let blankWaiting = false;
  let tail: Buffer = Buffer.alloc(0);
  let underscores = false;
  let firstLineOver = false;
  let zeroBytes = false;
  await eachPiece(path, (bytes) => {
    hash.update(bytes);
    if (utf8) {
      const joined = unfinished.length > 0 ? Buffer.concat([unfinished, bytes]) : bytes;
      const cut = lastAscii(joined);
      utf8 = isUtf8(joined.subarray(0, cut));
      unfinished = Buffer.from(joined.subarray(cut));
    }
    if (!underscores) {
      const from = firstLineOver ? 0 : bytes.indexOf(0x0a);
      if (from >= 0) {
        firstLineOver = true;
        underscores = bytes.indexOf(0x5f, from) >= 0;
      }
    }
    zeroBytes ||= bytes.indexOf(0) >= 0;
    if (!blankLines) {
      // A blank line counts only when something follows it.
      const end = lastText(bytes);
      const across = firstBlank(Buffer.concat([tail, bytes.subarray(0, 3)]));
      const inside = firstBlank(bytes);
      if (end > 0 && (blankWaiting || across >= 0)) blankLines = true;
      else if (inside >= 0 && inside < end) blankLines = true;
      else blankWaiting = blankWaiting || across >= 0 || inside >= 0;
      tail = Buffer.from(bytes.subarray(-3));
    }
  });
  if (utf8 && unfinished.length > 0) utf8 = isUtf8(unfinished);
  return { fingerprint: hash.digest("hex"), utf8, blankLines, underscores, zeroBytes };
}

/** Reads a file piece by piece into one buffer, which the next piece overwrites. */
async function eachPiece(path: string, take: (bytes: Buffer) => void): Promise<void> {
  const file = await open(path);
  try {
    const buffer = Buffer.allocUnsafe(1 << 20);
    for (;;) {
      const { bytesRead } = await file.read(buffer, 0, buffer.length, null);
      if (bytesRead === 0) return;
      take(buffer.subarray(0, bytesRead));
    }
  } finally {
    await file.close();
  }
}

/** Length of the longest start that ends after an ASCII byte, where no character can be cut in two. */
function lastAscii(bytes: Buffer): number {
  let end = bytes.length;
  while (end > 0 && bytes[end - 1]! >= 0x80) end--;
  return end;
}

/** Position after the last byte that is no line end. */
function lastText(bytes: Buffer): number {
  let end = bytes.length;
  while (end > 0 && (bytes[end - 1] === 0x0a || bytes[end - 1] === 0x0d)) end--;
  return end;
}

/** Where a line with nothing on it first follows another, or −1. */
function firstBlank(bytes: Buffer): number {
  const places = ["\n\n", "\n\r\n", "\r\r"].map((pattern) => bytes.indexOf(pattern, 0, "latin1"));
  const found = places.filter((place) => place >= 0);
  return found.length > 0 ? Math.min(...found) : -1;
}
