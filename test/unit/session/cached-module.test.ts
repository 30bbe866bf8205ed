import assert from "node:assert/strict";
import { mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { test } from "node:test";
import { loadCached } from "../../../kernel/session/compiler/cached-module.js";

test("a module loads the same with kept code and without; code of another text is not used", () => {
  const folder = mkdtempSync(join(tmpdir(), "lagbook-cache-"));
  const file = join(folder, "large.cjs");
  const kept = join(folder, "kept");
  const load = () => {
    const { exports, keep } = loadCached(file, kept);
    const { twice, here } = exports as { twice(n: number): number; here: string };
    keep();
    return [twice(4), here];
  };
  try {
    writeFileSync(file, "exports.twice = (n) => 2 * n; exports.here = require('path').basename(__filename);");
    assert.deepEqual(load(), [8, "large.cjs"]);
    const [first] = readdirSync(kept);
    assert.match(first!, /^large\.cjs-v/);
    assert.deepEqual(load(), [8, "large.cjs"]);
    assert.deepEqual(readdirSync(kept), [first]);
    writeFileSync(file, "exports.twice = (n) => n + n + 0 * 'longer'.length; exports.here = 'there';");
    assert.deepEqual(load(), [8, "there"]);
    assert.equal(readdirSync(kept).length, 1);
    assert.notDeepEqual(readdirSync(kept), [first]);
    // What is kept may be anything: the engine refuses it, and the next to be kept replaces it.
    writeFileSync(join(kept, readdirSync(kept)[0]!), "rubbish");
    assert.deepEqual(load(), [8, "there"]);
    // Nor need there be a folder that can be written to.
    writeFileSync(join(folder, "file"), "");
    assert.deepEqual(typeof loadCached(file, join(folder, "file")).keep, "function");
    loadCached(file, join(folder, "file")).keep();
  } finally {
    rmSync(folder, { recursive: true });
  }
});
