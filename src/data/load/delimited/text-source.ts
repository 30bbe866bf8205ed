import { createReadStream } from "node:fs";

/** How the bytes of a file stand for characters. */
export type Encoding = "utf-8" | "windows-1252" | "utf-16le" | "utf-16be";

/** The text of a file piece by piece, the first `skip` lines and a byte order mark left out. */
export async function* textOf(path: string, encoding: Encoding, skip = 0): AsyncGenerator<string> {
  const decoder = new TextDecoder(encoding);
  let left = skip;
  for await (const chunk of createReadStream(path, { highWaterMark: 1 << 20 })) {
    let text = decoder.decode(chunk as Buffer, { stream: true });
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
  const rest = decoder.decode();
  if (rest.length > 0) yield rest;
}
