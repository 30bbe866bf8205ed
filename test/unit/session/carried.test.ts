import assert from "node:assert/strict";
import { test } from "node:test";
import { carry, globalBlocks } from "../../../kernel/session/compiler/carried.js";
import { applyEdits } from "../../../kernel/session/compiler/edits.js";

test("a namespace is carried to the next cell until a name of the cell replaces it", () => {
  const before = "declare namespace Geo {\n    const r = 3;\n}\ndeclare const n: number;\n";
  assert.equal(
    carry(before, "declare const n: number;\n"),
    "declare const n: number;\ndeclare namespace Geo {\n    const r = 3;\n}\n",
  );
  for (const after of [
    "declare const Geo: number;\n",
    "declare function Geo(): void;\n",
    'import { Geo } from "places";\n',
    "declare namespace Geo {\n    const r = 4;\n}\n",
  ]) {
    assert.equal(carry(before, after), after);
  }
});

test("global blocks are cut out place for place, and known by the names that they declare", () => {
  const source = "const a = 1\ndeclare global {\n  interface Array<T> { last(): T }\n  var x: number\n}\na";
  const { edits, blocks, names } = globalBlocks(source);
  const cell = applyEdits(source, edits).text;
  assert.equal(cell.replace(/\s+/g, " "), "const a = 1 a");
  assert.equal(blocks.trim(), source.slice(source.indexOf("declare"), source.lastIndexOf("\n")));
  for (const text of [cell, blocks]) {
    assert.deepEqual(
      text
        .split("\n")
        .slice(0, 4)
        .map((line) => line.length),
      source
        .split("\n")
        .slice(0, 4)
        .map((line) => line.length),
    );
  }
  assert.equal(names, "Array,x");
  assert.deepEqual(globalBlocks("const global = 1"), { edits: [], blocks: "", names: "" });
});
