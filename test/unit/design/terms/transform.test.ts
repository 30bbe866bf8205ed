import assert from "node:assert/strict";
import { test } from "node:test";
import { lag, log, own, product, standardise, step, times, trend } from "../../../../src/design/index.js";
import { agree } from "../../../support/digits.js";
import { gappedWeeks, names, only, values, weeks } from "../tables.js";

test("log, multiples and products, value by value", async () => {
  const table = await weeks();
  assert.deepEqual(
    names(
      [log("x"), times("x", 100), product("x", trend()), product("x", "x"), product("x", "flag", trend())],
      table,
    ),
    ["log x", "100 × x", "x × trend", "x²", "x × flag × trend"],
  );
  agree(values(log("x"), table), [...table.numbers("x")].map(Math.log), 16);
  assert.deepEqual(values(times("x", -2), table).slice(0, 3), [-2, -4, -10]);
  assert.deepEqual(values(product("x", trend()), table).slice(0, 3), [1, 4, 15]);
  assert.deepEqual(names(product(trend(2), ["x", "flag"]), table), [
    "trend × x",
    "trend × flag",
    "trend² × x",
    "trend² × flag",
  ]);
});

test("a product is beyond the table where either factor is, and keeps what both must say", async () => {
  const table = await weeks();
  const column = only(product(lag("x", 2), trend()), table);
  assert.deepEqual([...column.edge!].slice(0, 3), [1, 1, 0]);
  assert.equal(column.label, "x (t−2) × trend");
  assert.equal(column.note, "trend is 1 in 2024-W01");
  assert.deepEqual(
    only(product("x", lag("flag")), table).uses.map(({ oldest }) => oldest),
    [0, 1],
  );
  assert.equal(only(product("x", step("2024-W03")), table).note, undefined);
});

test("standardised over the rows that have it; the card states by what", async () => {
  const table = await weeks();
  const z = values(standardise("x"), table);
  const total = z.reduce((sum, value) => sum + value, 0);
  const squares = z.reduce((sum, value) => sum + value * value, 0);
  agree([1 + total, squares], [1, 9], 12);
  // x = i² + 1 for i = 0..9: mean 29.5, squares Σi⁴ − 10 × 28.5² = 15333 − 8122.5 = 7210.5, s = √801.1667.
  assert.equal(
    only(standardise("x"), table).note,
    "x is standardised by mean 29.5 and standard deviation 28.3049, over 10 weeks",
  );
  assert.deepEqual(names([standardise(log("x")), lag(standardise("x"))], table), [
    "standardised log x",
    "standardised x (t−1)",
  ]);
  const holed = await gappedWeeks();
  agree([values(standardise(lag("x")), holed)[1]! + 2], [2 + (0 - 27 / 6) / Math.sqrt(10.7)], 12); // 0 1 5 6 7 8
});

test("values without a logarithm and columns without variation are refused, with their place", async () => {
  const table = await weeks();
  const zero = own("zero", (_, i) => (i === 4 ? 0 : 1));
  assert.throws(() => values(log(zero), table), {
    name: "InputError",
    message: 'log zero: "zero" is 0 in 2024-W05 (row 5), which has no logarithm.',
  });
  assert.throws(() => values(standardise(own("flat", () => 1)), table), /standardise: "flat" does not vary/);
  assert.throws(() => times("x", Number.NaN), /factor must be a number other than zero, not NaN/);
  assert.throws(() => times("x", 0), /other than zero, not 0/);
  assert.throws(() => product("x", undefined as never), /product: give two terms/);
});
