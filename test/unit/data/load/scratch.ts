import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { after } from "node:test";
import { load, type TimeTable } from "../../../../src/data/index.js";
import type { LoadOptions } from "../../../../src/data/load/options.js";

const folder = mkdtempSync(join(tmpdir(), "lagbook-data-"));
after(() => rmSync(folder, { recursive: true }));

/** A file with this content in a folder that is removed when the tests are done. */
export function written(content: string | Uint8Array, name = "a.csv"): string {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
}

/** Loads a file with this content; the time column is called `t`. */
export function loaded(content: string | Uint8Array, options: Partial<LoadOptions> = {}): Promise<TimeTable> {
  return load(written(content), { time: "t", ...options });
}

/** `t,a` and ten days from 2020-01-01, the cell of each row as given. */
export function days(cell: (i: number) => string, delimiter = ",", count = 10): string {
  const lines = Array.from({ length: count }, (_, i) => {
    const day = new Date(Date.UTC(2020, 0, 1 + i)).toISOString().slice(0, 10);
    return `${day}${delimiter}${cell(i)}\n`;
  });
  return `t${delimiter}a\n${lines.join("")}`;
}

export const said = (table: TimeTable): string[] => table.findings.map(({ text }) => text);
