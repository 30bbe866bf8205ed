import assert from "node:assert/strict";
import { test } from "node:test";
import { columnsAt } from "../../../kernel/session/complete-columns.js";

const table = (...names: string[]) => ({ kind: "time-table", columns: names.map((name) => ({ name })) });
const values = {
  weeks: table("riders", "fare", "rain (mm)", 'a "quoted" name'),
  other: table("prices"),
  m: { kind: "fit", terms: ["intercept", "fare", "fare (t−1)"] },
  n: 3,
};
const at = (code: string) => {
  const offset = code.indexOf("|");
  return columnsAt(code.replace("|", ""), offset, values);
};

test("the call's own table decides, nested terms included", () => {
  assert.deepEqual(at("fit(weeks, 'r|")?.matches, ["riders", "rain (mm)"]);
  assert.deepEqual(at("fit(weeks, 'riders', [lag(log('fa|'))])")?.matches, ["fare"]);
  assert.deepEqual(at("other.column('|')")?.matches, ["prices"]);
  assert.deepEqual(at("weeks.between('2024').column('f|')")?.matches, ["fare"]);
});

test("a fit offers its terms", () => {
  assert.deepEqual(at("m.coefficient('fare|')")?.matches, ["fare", "fare (t−1)"]);
  assert.deepEqual(at("jointly(m, ['i|'])")?.matches, ["intercept"]);
});

test("with no table at hand all columns in scope are offered; outside strings none", () => {
  assert.deepEqual(at("lag('p|')")?.matches, ["prices"]);
  assert.equal(at("lag(p|)"), undefined);
  assert.equal(at("lag('fare')|"), undefined);
  assert.equal(at("import x from 'f|'"), undefined);
});

test("what is replaced is the inside of the string, and quotes are escaped", () => {
  const found = at('fit(weeks, "a|bc", [])')!;
  assert.deepEqual([found.start, found.end], [12, 15]);
  assert.deepEqual(found.matches, ['a \\"quoted\\" name']);
  assert.deepEqual(found.types, ["column"]);
});
