import assert from "node:assert/strict";
import { test } from "node:test";
import fc from "fast-check";
import { columnsOf } from "../../src/design/index.js";
import { classical, fit, lag, lead, load, times } from "../../src/index.js";
import { counterRandom } from "../../src/numeric/index.js";
import { agree } from "../support/digits.js";

const example = (seed: number, T: number, start: number) => {
  const random = counterRandom(seed, T);
  const row = (i: number) => ({
    t: start + i,
    y: random.normal(),
    a: random.normal(),
    b: 5 + random.normal(),
  });
  return load(
    Array.from({ length: T }, (_, i) => row(i)),
    { time: "t", every: "integer" },
  );
};
const arguments_ = [fc.nat(1e6), fc.integer({ min: 12, max: 60 })] as const;
const settings = { seed: 17, numRuns: 40 };

test("scaling a column scales its coefficient and its standard error, and nothing else", () =>
  fc.assert(
    fc.asyncProperty(
      ...arguments_,
      fc.double({ min: 1e-8, max: 1e8, noNaN: true }),
      async (seed, T, factor) => {
        const table = await example(seed, T, 0);
        const m = fit(table, "y", ["a", "b"], { covariance: classical() });
        const scaled = fit(table, "y", [times("a", factor), "b"], { covariance: classical() });
        agree(
          [scaled.coefficients[1]!.estimate * factor, scaled.coefficients[1]!.se * factor],
          [m.coefficients[1]!.estimate, m.coefficients[1]!.se],
          10,
        );
        agree(
          [scaled.coefficients[2]!.estimate, scaled.coefficients[0]!.estimate],
          [m.coefficients[2]!.estimate, m.coefficients[0]!.estimate],
          10,
        );
      },
    ),
    settings,
  ));

test("reordering the terms permutes the coefficients bit for bit", () =>
  fc.assert(
    fc.asyncProperty(...arguments_, async (seed, T) => {
      const table = await example(seed, T, 0);
      const m = fit(table, "y", ["a", "b", lag("a")]);
      const turned = fit(table, "y", [lag("a"), "b", "a"]);
      for (const { term, estimate } of m.coefficients)
        assert.equal(turned.coefficient(term).estimate, estimate);
    }),
    settings,
  ));

test("moving the whole table in time changes nothing", () =>
  fc.assert(
    fc.asyncProperty(...arguments_, fc.integer({ min: -1000, max: 1000 }), async (seed, T, start) => {
      const here = fit(await example(seed, T, 0), "y", [lag("a"), "b"]);
      const there = fit(await example(seed, T, start), "y", [lag("a"), "b"]);
      assert.deepEqual(there.coefficients, here.coefficients);
    }),
    settings,
  ));

test("a lag and then a lead give the column back, inside", () =>
  fc.assert(
    fc.asyncProperty(...arguments_, fc.integer({ min: 1, max: 5 }), async (seed, T, steps) => {
      const table = await example(seed, T, 0);
      const [back] = columnsOf(lead(lag("a", steps), steps), table);
      assert.deepEqual([...back!.values.slice(0, T - steps)], [...table.numbers("a").slice(0, T - steps)]);
    }),
    settings,
  ));
