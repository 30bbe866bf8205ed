import assert from "node:assert/strict";
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { test } from "node:test";
import { breaches, longest } from "../machine/house.js";
import { root } from "../root.js";

function sources(folder: string): Map<string, string> {
  const files = new Map<string, string>();
  for (const entry of readdirSync(join(root, folder), { recursive: true, encoding: "utf8" })) {
    const path = `${folder}/${entry.replaceAll("\\", "/")}`;
    // The WebAssembly kernels are of another language, with one file to a module.
    if (path.endsWith(".ts") && !path.startsWith("src/numeric/kernels/")) {
      files.set(path, readFileSync(join(root, path), "utf8"));
    }
  }
  return files;
}

test("imports go one way and through doors, and files are short", () => {
  const files = new Map([...sources("src"), ...sources("kernel")]);
  assert.ok(files.size > 20, "the sources were found");
  assert.deepEqual(breaches(files), []);
});

test("test files are short", () => {
  const long = [...sources("test")].filter(([, text]) => text.trimEnd().split("\n").length > longest);
  assert.deepEqual(
    long.map(([path]) => path),
    [],
  );
});

test("the check sees each kind of breach", () => {
  const seen = (path: string, text: string) => breaches(new Map([[path, text]]));
  assert.deepEqual(
    seen("src/design/a.ts", 'import { b } from "../data/index.js";\nimport c from "./c.js";'),
    [],
  );
  assert.deepEqual(seen("src/index.ts", 'export * from "./show/index.js";'), []);
  assert.deepEqual(seen("kernel/wire/a.ts", 'import { b } from "../../src/index.js";'), []);
  assert.match(seen("src/data/a.ts", 'import { b } from "../design/index.js";')[0]!, /one way/);
  assert.match(
    seen("src/design/a.ts", 'import type { B } from "../data/b.js";')[0]!,
    /past the door of src\/data/,
  );
  assert.match(seen("src/data/a.ts", 'const b = await import("../../kernel/wire/index.js");')[0]!, /one way/);
  assert.match(seen("src/data/a.ts", 'export * from "../index.js";')[0]!, /one way/);
  assert.match(seen("src/ledger/a.ts", 'import "../show/index.js";').join(), /nothing of pictures/);
  assert.match(
    seen("kernel/wire/a.ts", 'import { b } from "../session/run.js";')[0]!,
    /past the door of kernel\/session/,
  );
  assert.match(seen("src/other/a.ts", "")[0]!, /no known room/);
  assert.match(seen("src/data/a.ts", "x;\n".repeat(401))[0]!, /401 lines/);
  assert.deepEqual(seen("src/data/a.ts", '// import { b } from "../design/index.js";'), []);
});

test("the lock file names no address", () => {
  const lock = JSON.parse(readFileSync(join(root, "package-lock.json"), "utf8")) as {
    packages: Record<string, { resolved?: string }>;
  };
  const addressed = Object.entries(lock.packages).filter(([, entry]) => entry.resolved?.includes("://"));
  assert.deepEqual(addressed, []);
});

test("the top level holds what it should and nothing else", () => {
  const expected = new Set([
    ...["kernel", "src", "notebooks-demo", "test", "package.json", "package-lock.json", "tsconfig.json"],
    ...["README.md", "DEVELOPERS.md", "LICENSE", "node_modules", "dist"],
  ]);
  const extra = readdirSync(root).filter((name) => !name.startsWith(".") && !expected.has(name));
  assert.deepEqual(extra, []);
});
