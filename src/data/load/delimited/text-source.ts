import { createReadStream } from "node:fs";

/** How the bytes of a file stand for characters. */
export type Encoding = "utf-8" | "windows-1252" | "utf-16le" | "utf-16be";

/** What the bytes 0x80 to 0x9F stand for in Windows-1252 (WHATWG Encoding Standard, index windows-1252). */
const upper = "€\x81‚ƒ„…†‡ˆ‰Š‹Œ\x8dŽ\x8f\x90‘’“”•–—˜™š›œ\x9džŸ";

/** Turns bytes, given piece by piece, into text; a byte order mark is left out. */
export class Decoder {
  readonly #decoder: TextDecoder | undefined;

  constructor(encoding: Encoding) {
    // The decoder of Node 20 takes some of these bytes for control characters.
    this.#decoder = encoding === "windows-1252" ? undefined : new TextDecoder(encoding);
  }

  piece(bytes: Buffer): string {
    if (this.#decoder) return this.#decoder.decode(bytes, { stream: true });
    return bytes.toString("latin1").replace(/[\x80-\x9f]/g, (byte) => upper[byte.charCodeAt(0) - 0x80]!);
  }

  end(): string {
    return this.#decoder?.decode() ?? "";
  }
}

/** The text of a file piece by piece, the first `skip` lines and a byte order mark left out. */
export async function* textOf(path: string, encoding: Encoding, skip = 0): AsyncGenerator<string> {
  const decoder = new Decoder(encoding);
  let left = skip;
  for await (const chunk of createReadStream(path, { highWaterMark: 1 << 20 })) {
    let text = decoder.piece(chunk as Buffer);
    while (left > 0 && text.length > 0) {
      const end = text.indexOf("\n");
      if (end < 0) text = "";
      else {
        text = text.slice(end + 1);
        left--;
      }
    }
    if (text.length > 0) yield text;
  }
  const rest = decoder.end();
  if (rest.length > 0) yield rest;
}
