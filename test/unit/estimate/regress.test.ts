import assert from "node:assert/strict";
import { test } from "node:test";
import { load } from "../../../src/data/index.js";
import {
  type DesignOptions,
  design,
  own,
  seasonal,
  type TermLike,
  times,
} from "../../../src/design/index.js";
import { regress } from "../../../src/estimate/index.js";
import { crossproduct, dot, multiply } from "../../../src/numeric/index.js";
import { agree } from "../../support/digits.js";

const table = await load(
  Array.from({ length: 40 }, (_, i) => ({
    q: `${2000 + Math.floor(i / 4)}Q${(i % 4) + 1}`,
    y: Math.cos(i) * 3 + i,
    x: Math.sin(3 * i),
    z: (i * i) % 17,
  })),
  { time: "q" },
);
const of = (terms: TermLike, options?: DesignOptions, outcome: TermLike = "y") =>
  regress(design(table, outcome, terms, options));
const refused = (terms: TermLike, message: RegExp | string, outcome: TermLike = "y") =>
  assert.throws(() => of(terms, {}, outcome), { name: "InputError", message });

test("what is computed of a regression hangs together", () => {
  const m = of(["x", "z"]);
  assert.deepEqual([m.T, m.k, m.terms], [40, 3, ["intercept", "x", "z"]]);
  agree(
    Array.from(crossproduct(m.Q).data, (v) => v + 2),
    [3, 2, 2, 2, 3, 2, 2, 2, 3],
    14,
  );
  agree([m.leverage.reduce((a, b) => a + b, 0)], [3], 14); // the trace of a projection is its rank
  agree([dot(m.residuals, m.residuals)], [m.rss], 15);
  const identity = multiply(m.gramInverse, crossproduct(m.X));
  agree(
    Array.from(identity.data, (v) => v + 2),
    [3, 2, 2, 2, 3, 2, 2, 2, 3],
    12,
  );
  for (let j = 0; j < 3; j++)
    assert.ok(Math.abs(dot(m.X.data.subarray(j * 40, (j + 1) * 40), m.residuals)) < 1e-11);
  assert.equal(m.periodName!(4), "2001Q1");
  assert.equal(m.Q, m.Q);
});

test("terms that depend on one another are named with the combination", () => {
  refused(
    ["x", "z", own("w", (r) => 2 * r["x"] - 3 * r["z"] + 1)],
    'fit: the terms depend on one another: "z" = 0.333333 × "intercept" + 0.666667 × "x" − 0.333333 × "w" in every period used. Leave one of them out.',
  );
  refused(seasonal({ contrast: "all" }), /"Q4" = "intercept" − "Q1" − "Q2" − "Q3" in every period used/);
  refused(["x", times("x", 2)], /"2 × x" = 2 × "x" in every/);
  refused(
    ["x", "z", own("v", (r) => r["x"] + r["z"]), own("w", (r) => r["x"] - r["z"])],
    /"v" = "x" \+ "z" in every period used\. The same holds of "w"\. Leave one of them out for each\./,
  );
  refused(
    own("far", (r) => 1e18 + 100 * r["z"]),
    /"far" hardly varies against its size and cannot be told from the intercept/,
  );
});

test("all the seasons without an intercept are no dependence", () => {
  assert.equal(of(seasonal({ contrast: "all" }), { intercept: false }).k, 4);
});

test("sizes whose squares cannot be held are refused with a unit that can", () => {
  const scaled = (factor: number, name: string) => own("w", (r) => r[name] * factor);
  refused("x", /"w" has values of a size \(up to .*e\+201\) .* times\("w", 1e-201\)/, scaled(1e200, "y"));
  refused("x", /"w" has values of a size/, scaled(1e-200, "y"));
  refused(scaled(1e180, "x"), /"w" has values of a size/);
  refused(scaled(1e-180, "x"), /"w" has values of a size/);
  agree(
    of(scaled(1e-100, "x")).coefficients,
    [of("x").coefficients[0]!, of("x").coefficients[1]! * 1e100],
    14,
  );
});
