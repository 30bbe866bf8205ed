// Weighted sums of χ² variables against mpmath at 40 digits (make_quadratic_forms.py).
import { test } from "node:test";
import { craigTail, imhofUpper } from "../../../src/numeric/index.js";
import { fixture } from "../../root.js";
import { agree } from "../../support/digits.js";

const { sums, craig } = fixture<{
  sums: { weights: number[]; x: number; lower: number; upper: number }[];
  craig: { c: number; weights: number[]; p: number }[];
}>("reference/numeric/quadratic_forms.json");

test("tails of weighted sums of χ², of one sign and of both: 12 digits of the smaller one", () => {
  for (const { weights, x, lower, upper } of sums) {
    const what = `${weights.length} weights from ${weights[0]} at ${x}`;
    if (upper < 0.9) agree([imhofUpper(weights, x)], [upper], 12, what);
    const turned = weights.map((value) => -value);
    if (lower < 0.9) agree([imhofUpper(turned, -x)], [lower], 12, `${what}, lower`);
  }
});

test("Craig's integral: 13 digits from p = 1 − 1e-4 to 1e-100, 12 further out", () => {
  for (const { c, weights, p } of craig)
    if (p > 1e-290)
      agree([craigTail(c, weights)], [p], p > 1e-100 ? 13 : 12, `${weights.length} weights, c = ${c}`);
});
