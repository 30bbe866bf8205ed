import assert from "node:assert/strict";
import { test } from "node:test";
import { load } from "../../../src/data/index.js";
import { design } from "../../../src/design/index.js";
import { judgedCoefficients } from "../../../src/estimate/coefficients.js";
import { type Covariance, regress, requireLevel } from "../../../src/estimate/index.js";
import { matrix, normal } from "../../../src/numeric/index.js";
import { agree } from "../../support/digits.js";

const table = await load(
  [3, 1, 4, 1, 5, 9, 2, 6].map((y, i) => ({ year: 2000 + i, y, x: i * i })),
  { time: "year" },
);
const regression = regress(design(table, "y", "x"));
const covariance = (...variances: [number, number]): Covariance => ({
  label: "made up",
  matrix: matrix(2, 2, Float64Array.of(variances[0], 0, 0, variances[1])),
  details: {},
  remarks: [],
  reference: () => ({
    name: "normal",
    twoSided: (t) => 2 * normal.upper(Math.abs(t)),
    critical: (level) => normal.upperQuantile((1 - level) / 2),
  }),
  joint: () => {
    throw new Error("not asked");
  },
});

test("estimate, standard error, interval and p under the estimator's own law", () => {
  const [, x] = judgedCoefficients(regression, covariance(1, 0.04), 0.9);
  assert.equal(x!.term, "x");
  assert.equal(x!.estimate, regression.coefficients[1]);
  // 1.6448536269514722 is the standard normal quantile of 0.95.
  agree([x!.se, x!.statistic], [0.2, x!.estimate / 0.2], 15);
  agree(
    [x!.high - x!.estimate, x!.estimate - x!.low],
    [0.2 * 1.6448536269514722, 0.2 * 1.6448536269514722],
    13,
  );
  agree([x!.p], [2 * normal.upper(Math.abs(x!.estimate) / 0.2)], 14);
});

test("a variance that came out negative leaves the estimate and nothing else", () => {
  const [constant, x] = judgedCoefficients(regression, covariance(1, -0.01), 0.95);
  assert.equal(Number.isNaN(constant!.se), false);
  assert.equal(x!.estimate, regression.coefficients[1]);
  assert.deepEqual([x!.se, x!.statistic, x!.low, x!.high, x!.p], Array(5).fill(Number.NaN));
});

test("rows cannot be changed", () => {
  const rows = judgedCoefficients(regression, covariance(1, 1), 0.95) as unknown as { estimate: number }[];
  assert.throws(() => {
    rows[0]!.estimate = 0;
  }, TypeError);
  assert.throws(() => rows.pop(), TypeError);
});

test("a level is a probability", () => {
  for (const level of [0, 1, -0.5, Number.NaN, "0.95"])
    assert.throws(() => requireLevel(level as number), /must lie between 0 and 1/);
  assert.throws(() => requireLevel(95), /Did you mean 0\.95\?/);
});
