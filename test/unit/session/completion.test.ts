import assert from "node:assert/strict";
import { test } from "node:test";
import { columnsAt } from "../../../kernel/session/completion/columns.js";
import { filesAt } from "../../../kernel/session/completion/files.js";
import { placeAt } from "../../../kernel/session/completion/place.js";
import { fixturePath } from "../../root.js";

const table = (...names: string[]) => ({ kind: "time-table", columns: names.map((name) => ({ name })) });
const values = {
  weeks: table("riders", "fare", "rain (mm)", 'a "quoted" name'),
  other: table("prices"),
  m: { kind: "fit", terms: ["intercept", "fare", "fare (t−1)"] },
  n: 3,
};
const at = (code: string) => {
  const offset = code.indexOf("|");
  const cell = code.replace("|", "");
  return columnsAt(placeAt(cell, offset), cell, offset, values);
};

test("the call's own table decides, nested terms included", () => {
  assert.deepEqual(at("fit(weeks, 'r|")?.matches, ["riders", "rain (mm)"]);
  assert.deepEqual(at("fit(weeks, 'riders', [lag(log('fa|'))])")?.matches, ["fare"]);
  assert.deepEqual(at("other.column('|')")?.matches, ["prices"]);
  assert.deepEqual(at("weeks.between('2024').column('f|')")?.matches, ["fare"]);
  assert.deepEqual(at("fit(weeks.join(other), 'pri|'")?.matches, ["prices"]);
  assert.deepEqual(at("weeks.define({ price: r => r.fare }).column('p|')")?.matches, ["price"]);
});

test("a fit offers its terms", () => {
  assert.deepEqual(at("m.coefficient('fare|')")?.matches, ["fare", "fare (t−1)"]);
  assert.deepEqual(at("jointly(m, ['i|'])")?.matches, ["intercept"]);
});

test("with no table at hand all columns in scope are offered; outside strings none", () => {
  assert.deepEqual(at("lag('p|')")?.matches, ["prices"]);
  assert.equal(at("lag(p|)"), undefined);
  assert.equal(at("fit(weeks, r|)"), undefined);
  assert.equal(at("lag('fare')|"), undefined);
  assert.equal(at("import x from 'f|'"), undefined);
});

test("what is replaced is the inside of the string, and quotes are escaped", () => {
  const found = at('fit(weeks, "a|bc", [])')!;
  assert.deepEqual([found.start, found.end], [12, 15]);
  assert.deepEqual(found.matches, ['a \\"quoted\\" name']);
  assert.deepEqual(found.types, ["column"]);
});

test("keys and rows of a table take its columns too", () => {
  assert.deepEqual(at("weeks.to('month', { r|")?.matches, ["riders", '"rain (mm)"']);
  assert.deepEqual(at("weeks.to('month', { fare: mean, r| })")?.matches, ["riders", '"rain (mm)"']);
  assert.deepEqual(at("combine(m, { |")?.matches, ["intercept", "fare", '"fare (t−1)"']);
  assert.deepEqual(at("weeks.define({ real: r => r.fa|re / 2 })")?.matches, ["fare"]);
  assert.deepEqual(at("weeks.define({ real: r => r['ra|'] })")?.matches, ["rain (mm)"]);
  for (const code of [
    "weeks.to('month', { fare: r|",
    "weeks.define({ real: r => f|",
    "const o = { r|",
    "weeks.f|",
  ]) {
    assert.equal(at(code), undefined, code);
  }
});

test("load offers files and folders, an import of a local file the modules", () => {
  const files = (code: string) => {
    const offset = code.length;
    return filesAt(placeAt(code, offset), code, offset, fixturePath("unit/session/completion-files"))
      ?.matches;
  };
  assert.deepEqual(files("load('"), ["inner/", "weeks.csv"]);
  assert.deepEqual(files("await load('inner/d"), ["inner/days.csv"]);
  assert.deepEqual(files("load('nowhere/"), []);
  assert.deepEqual(files("import { a } from './"), ["./inner/"]);
  assert.deepEqual(files("import { a } from './inner/"), ["./inner/helper"]);
  assert.deepEqual(files("import { a } from 'lagb"), ["lagbook"]);
  assert.ok(files("import('node:f")?.includes("node:fs/promises"));
  assert.ok(files("import x from 'ts")?.includes("tslab"));
  assert.equal(files("fit('"), undefined);
});
