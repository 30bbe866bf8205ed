import { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import type * as TypeScript from "@tslab/typescript-for-tslab";

const require = createRequire(import.meta.url);
/** The compiler's main file. */
export const compilerPath = require.resolve("@tslab/typescript-for-tslab");

/** The TypeScript that cells are compiled with, as it comes. */
export const ts = require(compilerPath) as typeof TypeScript;

/** Folder of the built package: the one with `package.json`. */
export const packageFolder = findPackageFolder();

function findPackageFolder(): string {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!ts.sys.fileExists(join(folder, "package.json"))) folder = dirname(folder);
  return folder;
}
