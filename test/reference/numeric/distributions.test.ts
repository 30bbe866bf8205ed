// Both tails and quantiles against mpmath at 50 digits (make_distributions.py).
import assert from "node:assert/strict";
import { test } from "node:test";
import { chiSquared, fisher, normal, studentT } from "../../../src/numeric/index.js";
import { fixture } from "../../root.js";
import { agree, digits } from "../../support/digits.js";

interface Case {
  x: number;
  df: number[];
  lower: number;
  upper: number;
}
const cases = fixture<
  Record<"normal" | "studentT" | "fisher" | "chiSquared", Case[]> & {
    normalQuantile: { p: number; x: number }[];
  }
>("reference/numeric/distributions.json");
type Tail = (x: number, ...df: number[]) => number;
type Law = Record<"cdf" | "upper" | "quantile" | "upperQuantile", Tail>;
const laws: Record<string, Law> = { normal, studentT, fisher, chiSquared } as never;
/** Smaller numbers than this are left out: doubles lose digits on the way to zero. */
const least = 1e-300;

/** The digits asked of a tail. */
const wanted = (tail: number) => (tail > 1e-50 ? 13 : 12);

for (const name of ["normal", "studentT", "fisher", "chiSquared"] as const) {
  const law = laws[name]!;
  test(`${name}: 13 digits of either tail down to 1e-50, 12 to 1e-300; quantiles of either return`, () => {
    for (const { x, df, lower, upper } of cases[name]) {
      const what = `${name}(${df}) at ${x}`;
      for (const [tail, value, inverse] of [
        [upper, law.upper, law.upperQuantile],
        [lower, law.cdf, law.quantile],
      ] as [number, Tail, Tail][]) {
        if (tail < least) continue;
        agree([value(x, ...df)], [tail], wanted(tail), what);
        // Beside the median a tail hardly moves with x, far out x hardly moves with the tail.
        const back = inverse(tail, ...df);
        assert.ok(
          digits(back, x) >= 11 || digits(value(back, ...df), tail) >= 14,
          `${what}: ${back} as the quantile of ${tail}`,
        );
      }
    }
  });
}

test("normal quantiles to 14 digits down to p = 1e-300", () => {
  for (const { p, x } of cases.normalQuantile) agree([normal.quantile(p)], [x], 14, `p = ${p}`);
});

test("infinitely many degrees of freedom give the limit laws; no or negative ones give no number", () => {
  const many = Number.POSITIVE_INFINITY;
  assert.equal(studentT.upper(1.3, many), normal.upper(1.3));
  assert.equal(fisher.upper(1.3, 4, many), chiSquared.upper(5.2, 4));
  for (const bad of [0, -1, Number.NaN]) {
    assert.ok(Number.isNaN(studentT.upper(1, bad)));
    assert.ok(Number.isNaN(fisher.upper(1, bad, 5)));
    assert.ok(Number.isNaN(chiSquared.cdf(1, bad)));
  }
});

test("the ends of the line", () => {
  for (const [law, df] of [
    [studentT, [3]],
    [fisher, [3, 9]],
    [chiSquared, [3]],
  ] as [Law, number[]][]) {
    assert.equal(law.upper(Number.POSITIVE_INFINITY, ...df), 0);
    assert.equal(law.cdf(Number.POSITIVE_INFINITY, ...df), 1);
    assert.equal(law.upperQuantile(0, ...df), Number.POSITIVE_INFINITY);
    assert.ok(Number.isNaN(law.upper(Number.NaN, ...df)));
    assert.ok(Number.isNaN(law.quantile(1.5, ...df)));
  }
  assert.equal(fisher.quantile(0, 3, 9), 0);
  assert.equal(studentT.quantile(0, 3), Number.NEGATIVE_INFINITY);
});
