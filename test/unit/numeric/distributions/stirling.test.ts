import assert from "node:assert/strict";
import { test } from "node:test";
import { deviance, logGamma, stirlingRest } from "../../../../src/numeric/distributions/stirling.js";
import { agree } from "../../../support/digits.js";

test("log Γ at whole and half numbers, from their products", () => {
  let factorial = 1; // exact up to 22!
  for (let n = 1; n <= 22; n++) {
    assert.ok(Math.abs(logGamma(n) - Math.log(factorial)) < 1e-14 * Math.max(1, Math.log(factorial)), `${n}`);
    factorial *= n;
  }
  let half = Math.sqrt(Math.PI); // Γ(½)
  for (let n = 0.5; n < 20; n++) {
    assert.ok(Math.abs(logGamma(n) - Math.log(half)) < 2e-14 * Math.max(1, Math.log(half)), `${n}`);
    half *= n;
  }
  // 1e6: mpmath at 30 digits
  agree([logGamma(1e6), logGamma(1e-5)], [12815504.569147612, 11.512919692895827], 14);
});

test("what Stirling's formula leaves: the same by series and by recursion", () => {
  // mpmath at 30 digits
  agree(
    [0.001, 14.5, 15, 200].map(stirlingRest),
    [2.54227046796709454, 0.00574621651301011568, 0.00555473355196280137, 0.000416666319446924557],
    13,
  );
  agree([stirlingRest(1)], [1 - 0.5 * Math.log(2 * Math.PI)], 14);
});

const series = (h: number) =>
  h ** 2 * (1 / 2 - h * (1 / 3 - h * (1 / 4 - h * (1 / 5 - h * (1 / 6 - h / 7)))));

test("the deviance beside its zero, where the plain formula has no digits", () => {
  // x log(x/m) + m − x with m = x(1 + h): x (h − log1p(h)) = x (h²/2 − h³/3 + ...)
  for (const h of [1e-7, -1e-5, 1e-3]) {
    const m = 3 * (1 + h);
    const exact = (m - 3) / 3; // the h that m has after rounding
    agree([deviance(3, m)], [3 * series(exact)], 14);
  }
  agree([deviance(2, 5)], [2 * Math.log(0.4) + 3], 15);
});
