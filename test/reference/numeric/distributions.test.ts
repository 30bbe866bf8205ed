// Tails and quantiles against mpmath at 40 digits (make_distributions.py).
import { test } from "node:test";
import { chiSquared, fisher, normal, studentT } from "../../../src/numeric/index.js";
import { fixture } from "../../root.js";
import { agree } from "../../support/digits.js";

interface Case {
  x: number;
  df: number[];
  upper: number;
}
const cases = fixture<
  Record<"normal" | "studentT" | "fisher" | "chiSquared", Case[]> & {
    normalQuantile: { p: number; x: number }[];
  }
>("reference/numeric/distributions.json");
type Law = {
  upper(x: number, ...df: number[]): number;
  cdf(x: number, ...df: number[]): number;
  upperQuantile(p: number, ...df: number[]): number;
};
const laws: Record<string, Law> = { normal, studentT, fisher, chiSquared } as never;
// Relative digits of the upper tail, down to 1e-300.
const least = { normal: 13, studentT: 11, fisher: 11, chiSquared: 11 };

for (const name of ["normal", "studentT", "fisher", "chiSquared"] as const) {
  test(`${name}: upper tail to ${least[name]} digits, quantiles return`, () => {
    for (const { x, df, upper } of cases[name]) {
      const what = `${name}(${df}) at ${x}`;
      agree([laws[name]!.upper(x, ...df)], [upper], least[name], what);
      agree([laws[name]!.cdf(x, ...df) + upper], [1], 14, `${what}, both tails`);
      const conditioned = upper < 0.99 && upper > 1e-290;
      if (conditioned) agree([laws[name]!.upperQuantile(upper, ...df)], [x], 9, `${what}, quantile`);
    }
  });
}

test("normal quantiles to 14 digits down to p = 1e-300", () => {
  for (const { p, x } of cases.normalQuantile) agree([normal.quantile(p)], [x], 14, `p = ${p}`);
});
