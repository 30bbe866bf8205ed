import assert from "node:assert/strict";
import { afterEach, test } from "node:test";
import {
  displaySymbol,
  nearestName,
  type Progress,
  reportProgress,
  showProgressIn,
} from "../../../src/data/index.js";
import { suggestion } from "../../../src/data/nearest.js";
import { months } from "./tables.js";

test("the nearest name by edits and case, and none where none is near", () => {
  const names = ["riders", "fare", "fuel price", "rain"];
  assert.equal(nearestName("rider", names), "riders");
  assert.equal(nearestName("Fare", names), "fare");
  assert.equal(nearestName("fael price", names), "fuel price");
  assert.equal(nearestName("raln", names), "rain");
  assert.equal(nearestName("sunshine", names), undefined);
  assert.equal(suggestion("far", names), ' Did you mean "fare"?');
  assert.match(suggestion("zzzzzz", names), /^ There are: "riders", "fare"/);
  assert.match(
    suggestion(
      "zzzzzz",
      Array.from({ length: 20 }, (_, i) => `a${i}`),
    ),
    /and 8 more\.$/,
  );
});

afterEach(() => showProgressIn(undefined));

test("progress shows after a second, at most ten times a second, and ends", (t) => {
  t.mock.timers.enable({ apis: ["Date"], now: 1000 });
  const seen: Progress[] = [];
  showProgressIn((progress) => seen.push(progress));
  const short = reportProgress("short", "rows", 10);
  short.at(5);
  short.end(10);
  assert.equal(seen.length, 0);
  const long = reportProgress("long", "rows");
  for (let i = 1; i <= 100; i++) {
    t.mock.timers.tick(20);
    long.at(i, 200);
  }
  long.end(200);
  assert.ok(seen.length >= 10 && seen.length <= 12, `${seen.length} reports`);
  assert.deepEqual(seen[0], { task: "long", done: 50, unit: "rows", finished: false, total: 200 });
  assert.deepEqual(seen.at(-1), { task: "long", done: 200, unit: "rows", finished: true, total: 200 });
});

test("a table names its columns, refuses others with the nearest, and shows without a presenter", async () => {
  const table = await months(3);
  assert.deepEqual(table.names, ["x", "y"]);
  assert.ok(table.has("x") && !table.has("z"));
  assert.throws(() => table.column("X"), /the table has no column "X". Did you mean "x"/);
  const text = table.define({ name: () => "a" });
  assert.throws(
    () => text.numbers("name"),
    /column "name" holds text \("a" in 2020-01\), not numbers; use categories\("name"\)/,
  );
  const bundle = (await table[displaySymbol]()) as Record<string, string>;
  assert.equal(JSON.parse(bundle["text/plain"]!).T, 3);
});
