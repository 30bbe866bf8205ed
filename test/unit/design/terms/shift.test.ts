import assert from "node:assert/strict";
import { test } from "node:test";
import { lag, lags, lead, log, own, seasonal, step, trend } from "../../../../src/design/index.js";
import { gappedWeeks, names, only, quarters, values, weeks } from "../tables.js";

const { NaN: none } = Number;

test("labels of lags, leads and of lags inside other terms", async () => {
  const table = await weeks();
  assert.deepEqual(names([lag("x"), lag("x", 3), lead("x"), ...lags("x", 0, 1)], table), [
    "x (t−1)",
    "x (t−3)",
    "x (t+1)",
    "x",
    "x (t−1)",
  ]);
  assert.deepEqual(names([lag(log("x"), 2), log(lag("x")), lag(lag("x")), lead(lag("x"))], table), [
    "log x (t−2)",
    "log x (t−1)",
    "x (t−2)",
    "x",
  ]);
  assert.deepEqual(names(lag(["x", log("x")]), table), ["x (t−1)", "log x (t−1)"]);
});

test("a lag steps in time: across a gap it is missing, at the start it is beyond the table", async () => {
  const table = await gappedWeeks(); // rows stand for weeks 1 2 3 6 7 8 9 10
  const column = only(lag("x"), table);
  assert.deepEqual([...column.values], [none, 0, 1, none, 5, 6, 7, 8]);
  assert.deepEqual([...column.edge!], [1, 0, 0, 0, 0, 0, 0, 0]);
  assert.deepEqual(values(lag("x", 3), table), [none, none, none, 2, none, none, 5, 6]);
  assert.deepEqual([...only(lag("x", 3), table).edge!], [1, 1, 1, 0, 0, 0, 0, 0]);
  assert.deepEqual(values(lead("x"), table), [1, 2, none, 6, 7, 8, 9, none]);
});

test("a lag of a lead is one move, and loses what that loses", async () => {
  const column = only(lag(lead("x", 2)), await weeks());
  assert.equal(column.label, "x (t+1)");
  assert.deepEqual([...column.edge!], [0, 0, 0, 0, 0, 0, 0, 0, 0, 1]);
});

test("the lag of a term made of time alone is known at every period", async () => {
  const table = await gappedWeeks();
  assert.deepEqual(values(lag(step("2024-W07"), 2), table), [0, 0, 0, 0, 0, 0, 1, 1]);
  assert.deepEqual(values(lag(trend()), table), [0, 1, 2, 5, 6, 7, 8, 9]);
  assert.deepEqual(names(lag(seasonal()), await quarters(8)), ["Q2 (t−1)", "Q3 (t−1)", "Q4 (t−1)"]);
  assert.deepEqual(values(lag(seasonal()), await quarters(5)), [0, 0, 1, 0, 0]);
});

test("what was filled and what a term is made of move with it", async () => {
  const table = (await gappedWeeks()).fill("x", "linear");
  assert.deepEqual([...only(lag("x"), table).filled!], [0, 0, 0, 0, 1, 1, 0, 0, 0, 0]);
  assert.deepEqual(only(lag("x", 2), table).uses, [{ column: "x", newest: 2, oldest: 2 }]);
  assert.deepEqual(only(lead(own("twice", (r) => 2 * r["x"])), table).uses, [
    { column: "x", newest: -1, oldest: -1 },
  ]);
});

test("steps that cannot be meant are refused", () => {
  assert.throws(() => lag("x", -1), /lag: the number of steps must be a whole number from 0 up, not -1/);
  assert.throws(() => lead("x", 0.5), /lead: the number of steps .* not 0\.5/);
  assert.throws(() => lags("x", 3, 1), /last lag \(1\) comes before the first \(3\)/);
  assert.throws(() => lags("x", 4, undefined as never), /give the first and the last lag/);
});
