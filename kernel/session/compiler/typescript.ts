import { existsSync } from "node:fs";
import { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import type * as TypeScript from "@tslab/typescript-for-tslab";
import { loadCached } from "./cached-module.js";

/** Folder of the built package: the one with `package.json`. */
export const packageFolder = findPackageFolder();

function findPackageFolder(): string {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(folder, "package.json"))) folder = dirname(folder);
  return folder;
}

/** The compiler's main file. */
export const compilerPath = createRequire(import.meta.url).resolve("@tslab/typescript-for-tslab");

const loaded = loadCached(compilerPath, join(packageFolder, "dist", "compiled"));

/** The TypeScript that cells are compiled with, as it comes. */
export const ts = loaded.exports as typeof TypeScript;

/** Makes the next start quicker, if this one found nothing that did. Takes a moment, so it is for when nobody waits. */
export const keepCompiled = loaded.keep;
