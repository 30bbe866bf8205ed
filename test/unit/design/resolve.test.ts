import assert from "node:assert/strict";
import { test } from "node:test";
import { load } from "../../../src/data/index.js";
import { labelOf, lag, log, trend } from "../../../src/design/index.js";
import { names, weeks } from "./tables.js";

test("a string is a column's exact name, whatever signs are in it", async () => {
  const odd = ["a + b", "log x", "x (t−1)", "1", "-", "a:b", "~ y", "I(x^2)", "", "<b>"];
  const table = await load(
    [1, 2, 3].map((year) => ({ year: 2000 + year, ...Object.fromEntries(odd.map((name) => [name, year])) })),
    { time: "year" },
  );
  assert.deepEqual(names(odd, table), odd);
  assert.deepEqual(names(lag("x (t−1)"), table), ["x (t−1) (t−1)"]);
});

test("lists nest, and have a label each", async () => {
  assert.deepEqual(names(["x", [log("x"), [lag("x")]]], await weeks()), ["x", "log x", "x (t−1)"]);
  assert.equal(labelOf(["x", [log("x")]]).label, "x, log x");
});

test("what is no term is refused, with how to make one", async () => {
  const table = await weeks();
  const refused = (term: unknown, pattern: RegExp) =>
    assert.throws(() => names(term as never, table), { name: "InputError", message: pattern });
  refused(7, /7 is no term\. A term is a column's name, or made by lag/);
  refused(undefined, /undefined is no term/);
  refused(null, /null is no term/);
  refused({ x: 1 }, /an object that is not a term is no term/);
  refused(trend, /the function trend is no term\. A maker of terms is called, such as trend\(\)/);
  refused("group", /"group" holds text \("b" in 2024-W01\), not numbers; use categories\("group"\)/);
  refused("X", /no column "X"\. Did you mean "x"\?/);
});
