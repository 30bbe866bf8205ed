// Open series (sources in cases.json), from the raw file through load, terms and fit. Expected values: 60-digit
// arithmetic on the file's doubles, rounded once; cross-checked against base R where they were made.
import assert from "node:assert/strict";
import { test } from "node:test";
import { diff, fit, load } from "../../../src/index.js";
import { fixturePath } from "../../root.js";
import { agree } from "../../support/digits.js";
import { cases, fitCase, specifications } from "./specifications.js";

for (const name of Object.keys(specifications)) {
  test(`${name}: 14 digits of coefficients, standard errors and t, 13 of p`, async () => {
    const { T, k, laggedOutcome, ols } = cases[name]!;
    const m = await fitCase(name);
    assert.deepEqual([m.T, m.k, m.design.laggedOutcome], [T, k, laggedOutcome]);
    agree(
      m.coefficients.map(({ estimate }) => estimate),
      ols.coefficients,
      14,
      "coefficient",
    );
    agree(
      m.coefficients.map(({ se }) => se),
      ols.se_classical,
      14,
      "se",
    );
    agree(
      m.coefficients.map(({ statistic }) => statistic),
      ols.t,
      14,
      "t",
    );
    agree(
      m.coefficients.map(({ p }) => p),
      ols.p_two_sided,
      13,
      "p",
    );
    agree(
      [m.rss, m.logLikelihood, m.aic, m.bic],
      [ols.rss, ols.loglik, ols.aic, ols.bic],
      14,
      "rss, ℓ, AIC, BIC",
    );
    if (m.k > 1) agree([m.rSquared.value], [ols.r_squared], 14, "R²");
    agree(m.residuals.slice(0, 5), ols.residuals_first5, 13, "residual");
    agree(m.residuals.slice(-5), ols.residuals_last5, 13, "residual");
    agree([Math.max(...m.regression.leverage)], [ols.max_leverage], 13, "leverage");
    agree([m.regression.condition], [ols.condition_number_scaled], 12, "condition");
    const [first] = m.coefficients;
    agree([(first!.high - first!.estimate) / first!.se], [ols.t_critical_975], 13, "critical value");
  });
}

test("differences at the seasonal and the first lag agree with their definition", async () => {
  const table = await load(fixturePath("reference/estimate/cases/ukgas_trend_seasonal_lag.csv"), {
    time: "quarter",
  });
  const m = fit(table, diff("gas", { over: "season" }), [diff("gas", { order: 2 })]);
  const gas = table.numbers("gas");
  assert.equal(m.T, table.T - 4);
  agree(
    m.regression.y,
    gas.slice(4).map((value, i) => value - gas[i]!),
    13,
  );
  agree(
    m.regression.X.data.slice(m.T),
    gas.slice(4).map((value, i) => value - 2 * gas[i + 3]! + gas[i + 2]!),
    13,
  );
});
