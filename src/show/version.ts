import { readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

let known: string | undefined;

/** Lagbook's own version, from the nearest package.json above this file (whether run from src/ or dist/). */
export function lagbookVersion(): string {
  known ??= find(dirname(fileURLToPath(import.meta.url)));
  return known;
}

function find(folder: string): string {
  try {
    const { name, version } = JSON.parse(readFileSync(join(folder, "package.json"), "utf8")) as {
      name?: string;
      version?: string;
    };
    if (name === "lagbook" && version) return version;
  } catch {
    // No package.json here: look one folder up.
  }
  const above = dirname(folder);
  return above === folder ? "unknown" : find(above);
}
