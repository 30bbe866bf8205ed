import { existsSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

function findRoot(): string {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(folder, "package.json"))) folder = dirname(folder);
  return folder;
}

/** The checkout's top folder, whether a test runs from its source or from dist/. */
export const root = findRoot();

/** The full path of a file under test/. */
export function fixturePath(path: string): string {
  return join(root, "test", path);
}

/** The parsed content of a JSON file under test/. */
export function fixture<T>(path: string): T {
  return JSON.parse(readFileSync(fixturePath(path), "utf8")) as T;
}
