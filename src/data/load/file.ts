import { createHash } from "node:crypto";
import { createReadStream, existsSync, statSync } from "node:fs";
import { readdir } from "node:fs/promises";
import { basename, dirname } from "node:path";
import { InputError } from "../../numeric/index.js";
import { suggestion } from "../nearest.js";

/** Throws InputError, suggesting the nearest name in its folder, when there is no such file. */
export async function requireFile(path: string): Promise<void> {
  if (existsSync(path)) {
    if (statSync(path).isFile()) return;
    throw new InputError(`load: ${path} is a folder, not a file.`);
  }
  const folder = dirname(path);
  const names = existsSync(folder) ? (await readdir(folder)).filter((name) => !name.startsWith(".")) : [];
  const hint = names.length > 0 ? suggestion(basename(path), names) : ` There is no folder ${folder} either.`;
  throw new InputError(`load: there is no file ${path} (looked in ${process.cwd()}).${hint}`);
}

/** SHA-256 of a file's bytes, in hexadecimal. */
export async function fileFingerprint(path: string): Promise<string> {
  const hash = createHash("sha256");
  for await (const chunk of createReadStream(path, { highWaterMark: 1 << 20 })) hash.update(chunk as Buffer);
  return hash.digest("hex");
}
