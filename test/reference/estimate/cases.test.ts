// Open series (sources in cases.json), from the raw file through load, terms and fit. Expected values: 60-digit
// arithmetic on the file's doubles, rounded once; cross-checked against base R where they were made.
import assert from "node:assert/strict";
import { test } from "node:test";
import {
  classical,
  diff,
  type Fit,
  fit,
  lag,
  load,
  log,
  own,
  seasonal,
  step,
  trend,
} from "../../../src/index.js";
import { fixture, fixturePath } from "../../root.js";
import { agree } from "../../support/digits.js";

interface Ols {
  coefficients: number[];
  se_classical: number[];
  t: number[];
  p_two_sided: number[];
  rss: number;
  r_squared: number | null;
  loglik: number;
  aic: number;
  bic: number;
  t_critical_975: number;
  condition_number_scaled: number;
  residuals_first5: number[];
  residuals_last5: number[];
  max_leverage: number;
}
const cases = fixture<Record<string, { T: number; k: number; laggedOutcome: boolean; ols: Ols }>>(
  "reference/estimate/cases.json",
);
const read = (name: string, time: string) =>
  load(fixturePath(`reference/estimate/cases/${name}.csv`), { time });
const options = { covariance: classical() };

const fits: Record<string, () => Promise<Fit>> = {
  airmiles_quadratic: async () =>
    fit(await read("airmiles_quadratic", "year"), log("miles"), [trend(2)], options),
  lakehuron_trend: async () => fit(await read("lakehuron_trend", "year"), "level", [trend()], options),
  longley_full: async () =>
    fit(
      await read("longley_full", "year"),
      "Employed",
      [
        "GNP.deflator",
        "GNP",
        "Unemployed",
        "Armed.Forces",
        "Population",
        own("year", (row) => Number(row.period)),
      ],
      options,
    ),
  nile_mean: async () => fit(await read("nile_mean", "year"), "flow", [], options),
  nile_step: async () => fit(await read("nile_step", "year"), "flow", [step(1899)], options),
  seatbelts_lags: async () =>
    fit(
      await read("seatbelts_lags", "month"),
      log("drivers"),
      [lag(log("drivers"), 1), lag(log("drivers"), 12), log("PetrolPrice"), "law"],
      options,
    ),
  seatbelts_static_seasonal: async () =>
    fit(
      await read("seatbelts_static_seasonal", "month"),
      log("drivers"),
      [log("kms"), log("PetrolPrice"), "law", seasonal()],
      options,
    ),
  ukgas_trend_seasonal_lag: async () =>
    fit(
      await read("ukgas_trend_seasonal_lag", "quarter"),
      log("gas"),
      [trend(), seasonal(), lag(log("gas"))],
      options,
    ),
};

for (const [name, make] of Object.entries(fits)) {
  test(`${name}: 13 digits of coefficients and rss, 12 of standard errors, 10 of p`, async () => {
    const { T, k, laggedOutcome, ols } = cases[name]!;
    const m = await make();
    assert.deepEqual([m.T, m.k, m.design.laggedOutcome], [T, k, laggedOutcome]);
    agree(
      m.coefficients.map(({ estimate }) => estimate),
      ols.coefficients,
      13,
      "coefficient",
    );
    agree(
      m.coefficients.map(({ se }) => se),
      ols.se_classical,
      12,
      "se",
    );
    agree(
      m.coefficients.map(({ statistic }) => statistic),
      ols.t,
      12,
      "t",
    );
    agree(
      m.coefficients.map(({ p }) => p),
      ols.p_two_sided,
      10,
      "p",
    );
    agree(
      [m.rss, m.logLikelihood, m.aic, m.bic],
      [ols.rss, ols.loglik, ols.aic, ols.bic],
      12,
      "rss, ℓ, AIC, BIC",
    );
    if (ols.r_squared !== null && m.k > 1) agree([m.rSquared.value], [ols.r_squared], 12, "R²");
    agree(m.residuals.slice(0, 5), ols.residuals_first5, 9, "residual");
    agree(m.residuals.slice(-5), ols.residuals_last5, 9, "residual");
    agree([Math.max(...m.regression.leverage)], [ols.max_leverage], 11, "leverage");
    agree([m.regression.condition], [ols.condition_number_scaled], 8, "condition");
    const [first] = m.coefficients;
    agree([(first!.high - first!.estimate) / first!.se], [ols.t_critical_975], 11, "critical value");
  });
}

test("differences at the seasonal and the first lag agree with their definition", async () => {
  const table = await read("ukgas_trend_seasonal_lag", "quarter");
  const m = fit(table, diff("gas", { over: "season" }), [diff("gas", { order: 2 })], options);
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
