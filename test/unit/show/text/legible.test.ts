import assert from "node:assert/strict";
import { test } from "node:test";
import { legible, name, shorten } from "../../../../src/show/text/legible.js";
import { listed } from "../../../../src/show/text/listed.js";

test("what would be hidden is written out", () => {
  assert.equal(legible("fare\nriders"), "fare\\nriders");
  assert.equal(legible("a\tb\r"), "a\\tb\\r");
  assert.equal(legible("\u001b[31mred"), "\\u{1b}[31mred");
  assert.equal(legible("abc\u202edef"), "abc\\u{202e}def");
  assert.equal(legible("zero\u200bwidth"), "zero\\u{200b}width");
  assert.equal(legible("half \ud800"), "half \\u{d800}");
});

test("letters of any script stay", () => {
  for (const text of ["fare (t−1)", "Grüße", "日本", "הודעה", "👩‍👩‍👧", "e\u0301"]) {
    assert.equal(legible(text), text);
  }
});

test("long names keep both ends", () => {
  const long = `${"a".repeat(100)}_january`;
  const short = shorten(long, 40);
  assert.equal([...short].length, 40);
  assert.match(short, /^a+…a+_january$/);
  assert.equal(shorten("short"), "short");
  assert.ok(name("x".repeat(10_000_000)).length < 100);
});

test("names in a sentence", () => {
  assert.equal(listed([]), "");
  assert.equal(listed(["fare"]), "fare");
  assert.equal(listed(["fare", "rain"]), "fare and rain");
  assert.equal(listed(["a", "b", "c"]), "a, b and c");
  assert.equal(listed(["a", "b", "c", "d", "e"], 3), "a, b and 3 more");
});
