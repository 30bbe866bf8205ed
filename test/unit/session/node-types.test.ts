import assert from "node:assert/strict";
import { readFileSync } from "node:fs";
import { createRequire, isBuiltin } from "node:module";
import { dirname, join } from "node:path";
import { test } from "node:test";
import { nodeTypePaths } from "../../../kernel/session/compiler/node-types.js";
import { createSession } from "../../../kernel/session/index.js";

const folder = dirname(createRequire(import.meta.url).resolve("@types/node/package.json"));

test("files that are read on demand declare their modules and nothing global", () => {
  for (const [name, [file]] of Object.entries(nodeTypePaths)) {
    assert.ok(file!.startsWith(join(folder, "/")));
    const text = readFileSync(file!, "utf8");
    assert.match(text, new RegExp(`declare module ["']${name}["']`), `${file} declares ${name}`);
    assert.ok(!/^\s*global \{/m.test(text), `${file} declares globals`);
    assert.ok(isBuiltin(name), name);
  }
});

test("a cell that imports such a module has its types, and globals have theirs without an import", async () => {
  const session = await createSession({ directory: process.cwd(), emit: () => {} });
  try {
    const typed = async (code: string) => {
      const { status, evalue } = await session.execute(code);
      return status === "ok" ? "ok" : evalue;
    };
    assert.equal(await typed(`const b: Buffer = Buffer.from("a"); process.stdout.isTTY; setTimeout`), "ok");
    assert.match(String(await typed(`const n: number = process.cwd()`)), /string/);
    assert.equal(await typed(`process.stdout.write(""); process.stdin.on; process.hrtime.bigint()`), "ok");
    assert.equal(
      await typed(`new URL("a:b").href; crypto.randomUUID(); structuredClone([1]); typeof fetch`),
      "ok",
    );
    assert.equal(await typed(`import { promisify } from "util"; await promisify(setTimeout)(1)`), "ok");
    assert.equal(await typed(`import { gzipSync } from "zlib"; const z: Buffer = gzipSync("a")`), "ok");
    assert.match(
      String(await typed(`import * as h from "node:http2"; const h2: string = h.constants`)),
      /string/,
    );
    assert.equal(await typed(`import { Session } from "node:inspector"; typeof Session`), "ok");
    assert.match(
      String(await typed(`import { tmpdir } from "node:os"; const o: number = tmpdir()`)),
      /number/,
    );
  } finally {
    session.close();
  }
});
