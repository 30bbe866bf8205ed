import assert from "node:assert/strict";
import { test } from "node:test";
import { diff, growth, lag } from "../../../../src/design/index.js";
import { agree } from "../../../support/digits.js";
import { gappedWeeks, names, only, quarters, values, weeks } from "../tables.js";

test("labels: order above, steps below", async () => {
  const table = await weeks();
  assert.deepEqual(
    names(
      [
        diff("x"),
        diff("x", { order: 2 }),
        growth("x"),
        diff("x", { over: 3 }),
        diff("x", { over: 3, order: 2 }),
        lag(diff("x")),
        diff(lag("x", 2)),
        diff(growth("x")),
      ],
      table,
    ),
    ["Δ x", "Δ² x", "Δ log x", "Δ₃ x", "Δ₃² x", "Δ x (t−1)", "Δ x (t−2)", "Δ Δ log x"],
  );
  assert.deepEqual(names(diff("x", { over: "season" }), await quarters(8)), ["Δ₄ x"]);
});

test("differences of any order and span, by their definition", async () => {
  const table = await weeks(); // x = i² + 1
  assert.deepEqual(values(diff("x"), table), [NaN, 1, 3, 5, 7, 9, 11, 13, 15, 17]);
  assert.deepEqual(values(diff("x", { order: 2 }), table), [NaN, NaN, 2, 2, 2, 2, 2, 2, 2, 2]);
  assert.deepEqual(values(diff("x", { over: 3 }), table).slice(3), [9, 15, 21, 27, 33, 39, 45]);
  assert.deepEqual([...only(diff("x", { order: 2, over: 2 }), table).edge!], [1, 1, 1, 1, 0, 0, 0, 0, 0, 0]);
  assert.deepEqual(only(diff("x", { order: 2 }), table).uses, [{ column: "x", newest: 0, oldest: 2 }]);
  agree(values(growth("x"), table).slice(1, 3), [Math.log(2), Math.log(2.5)], 15);
  assert.deepEqual(values(diff("x", { over: "season" }), await quarters(6)), [NaN, NaN, NaN, NaN, 4, 4]);
});

test("across a gap a difference is missing", async () => {
  assert.deepEqual(values(diff("x"), await gappedWeeks()), [NaN, 1, 1, NaN, 1, 1, 1, 1]);
});

test("what cannot be meant is refused", async () => {
  assert.throws(() => diff("x", { order: 0 }), /diff: order must be 1, 2, \.\.\., not 0/);
  assert.throws(() => growth("x", { over: 1.5 }), /growth: over must be a number of steps/);
  assert.throws(
    () => diff("x", 2 as never),
    /diff: options come in braces, such as \{ order: \.\.\. \}, not as 2/,
  );
  assert.throws(() => diff("x", { ordr: 2 } as never), /no option "ordr"\. Did you mean "order"\?/);
  const table = await weeks();
  assert.throws(() => values(growth("y"), table), /no column "y"/);
});
