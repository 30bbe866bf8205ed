import assert from "node:assert/strict";
import { test } from "node:test";
import { max, mean, sum } from "../../../../src/data/index.js";
import { lag, rolling } from "../../../../src/design/index.js";
import { gappedWeeks, names, only, values, weeks } from "../tables.js";

test("an aggregate of the present and the periods before", async () => {
  const table = await weeks();
  assert.deepEqual(names([rolling("x", mean, 4), lag(rolling("x", sum, 2))], table), [
    "mean of 4 x",
    "sum of 2 x (t−1)",
  ]);
  assert.deepEqual(values(rolling("x", sum, 3), table).slice(0, 5), [NaN, NaN, 8, 17, 32]);
  assert.deepEqual(values(rolling("x", max, 2), table).slice(1, 4), [2, 5, 10]);
  const column = only(
    rolling("x", (window) => window[0]!, 3),
    table,
  );
  assert.deepEqual([...column.edge!].slice(0, 4), [1, 1, 0, 0]);
  assert.deepEqual(column.uses, [{ column: "x", newest: 0, oldest: 2 }]);
});

test("it steps in time: a window with a gap in it is missing", async () => {
  const table = await gappedWeeks();
  assert.deepEqual(values(rolling("x", mean, 2), table), [NaN, 0.5, 1.5, NaN, 5.5, 6.5, 7.5, 8.5]);
  const filled = table.fill("x", "linear");
  assert.deepEqual([...only(rolling("x", mean, 2), filled).filled!], [0, 0, 0, 1, 1, 1, 0, 0, 0, 0]);
});

test("what cannot be meant is refused", () => {
  assert.throws(() => rolling("x", 4 as never, 4), /rolling\("rain", mean, 4\)/);
  assert.throws(() => rolling("x", mean, 0), /whole number of periods from 1 up, not 0/);
});
