import assert from "node:assert/strict";
import { test } from "node:test";
import fc from "fast-check";
import { applyEdits } from "../../../kernel/session/compiler/edits.js";
import { annotateAny, prepare } from "../../../kernel/session/compiler/rewrite.js";

const prepared = (source: string) => applyEdits(source, prepare(source)).text;

test("a shorthand property gets its name spelled out, but not as the target of an assignment", () => {
  assert.equal(prepared("f({ n, m: 1 })"), "f({ n: n, m: 1 })");
  assert.equal(prepared("({ a, b } = pair)"), "({ a, b } = pair)");
  assert.equal(prepared("const { a, b } = pair"), "const { a, b } = pair");
});

test("export is blanked out, place for place", () => {
  assert.equal(
    prepared("export const n = 1\nexport default function f() {}"),
    "       const n = 1\n               function f() {}",
  );
});

test("names whose types cannot be written down are annotated", () => {
  const source = "const a = make(), b = 2";
  assert.equal(applyEdits(source, annotateAny(source, [6])).text, "const a: any = make(), b = 2");
});

test("places are mapped there and back through any edits", () => {
  fc.assert(
    fc.property(
      fc.string({ minLength: 1, maxLength: 40 }),
      fc.array(fc.nat(39), { maxLength: 5 }),
      (text, places) => {
        const starts = [...new Set(places.filter((at) => at < text.length))];
        const cell = applyEdits(
          text,
          starts.map((at) => ({ at, removed: 0, added: ": x" })),
        );
        for (let at = 0; at < text.length; at++) {
          assert.equal(cell.original(cell.rewritten(at)), at);
          assert.equal(cell.text[cell.rewritten(at)], text[at]);
        }
      },
    ),
    { seed: 3, numRuns: 200 },
  );
});
