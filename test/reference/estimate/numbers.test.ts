// The same series as numbers: <case>.design.csv holds y and the columns x1..xk (17 digits) that the expected values of
// cases.json were computed from in 60-digit arithmetic. Against them: the design matrix that the terms make of the raw
// file, and least squares alone.
import assert from "node:assert/strict";
import { test } from "node:test";
import { classical, fit, load } from "../../../src/index.js";
import { fixturePath } from "../../root.js";
import { agree } from "../../support/digits.js";
import { cases, fitCase, specifications } from "./specifications.js";

const numbersOf = (name: string) =>
  load(fixturePath(`reference/estimate/cases/${name}.design.csv`), { time: "row", every: "integer" });
const columns = (k: number) => Array.from({ length: k }, (_, j) => `x${j + 1}`);

for (const name of Object.keys(specifications)) {
  const { T, k, ols } = cases[name]!;

  test(`${name}: the terms make the very columns, to 15 digits`, async () => {
    const { y, X } = (await fitCase(name)).regression;
    const wanted = await numbersOf(name);
    assert.equal(wanted.T, T);
    agree(y, wanted.numbers("y"), 15, "y");
    columns(k).forEach((column, j) => {
      agree(X.data.subarray(j * T, (j + 1) * T), wanted.numbers(column), 15, column);
    });
  });

  test(`${name}: from its numbers, coefficients and residuals to the last bit, standard errors to 15 digits`, async () => {
    const m = fit(await numbersOf(name), "y", columns(k), { intercept: false, covariance: classical() });
    const of = (pick: "estimate" | "se" | "statistic" | "p") => m.coefficients.map((row) => row[pick]);
    assert.deepEqual(of("estimate"), ols.coefficients);
    assert.deepEqual([...m.residuals.slice(0, 5)], ols.residuals_first5);
    assert.deepEqual([...m.residuals.slice(-5)], ols.residuals_last5);
    agree(of("se"), ols.se_classical, 15, "se");
    agree(of("statistic"), ols.t, 15, "t");
    agree(of("p"), ols.p_two_sided, 13, "p");
    agree([m.rss], [ols.rss], 15, "rss");
    agree([m.logLikelihood, m.aic, m.bic], [ols.loglik, ols.aic, ols.bic], 14, "ℓ, AIC, BIC");
    assert.equal(m.rSquared.about, "mean"); // the constant is the column x1
    if (k > 1) agree([m.rSquared.value], [ols.r_squared], 15, "R²");
  });
}
