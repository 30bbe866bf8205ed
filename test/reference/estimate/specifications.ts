import type { TermLike } from "../../../src/design/index.js";
import { classical, type Fit, fit, lag, load, log, own, seasonal, step, trend } from "../../../src/index.js";
import { fixture, fixturePath } from "../../root.js";

/** Expected figures of a case, each list in the order of its regressors. */
export interface Ols {
  coefficients: number[];
  se_classical: number[];
  t: number[];
  p_two_sided: number[];
  rss: number;
  r_squared: number;
  loglik: number;
  aic: number;
  bic: number;
  t_critical_975: number;
  condition_number_scaled: number;
  residuals_first5: number[];
  residuals_last5: number[];
  max_leverage: number;
}

/** The open series (sources in cases.json), with what is expected of each (make_cases.py). */
export const cases = fixture<Record<string, { T: number; k: number; laggedOutcome: boolean; ols: Ols }>>(
  "reference/estimate/cases.json",
);

/** Time column, outcome and terms of each case, in the order of its regressors. */
export const specifications: Record<string, [time: string, outcome: TermLike, terms: TermLike[]]> = {
  airmiles_quadratic: ["year", log("miles"), [trend(2)]],
  lakehuron_trend: ["year", "level", [trend()]],
  longley_full: [
    "year",
    "Employed",
    [
      "GNP.deflator",
      "GNP",
      "Unemployed",
      "Armed.Forces",
      "Population",
      own("year", (row) => Number(row.period)),
    ],
  ],
  nile_mean: ["year", "flow", []],
  nile_step: ["year", "flow", [step(1899)]],
  seatbelts_lags: [
    "month",
    log("drivers"),
    [lag(log("drivers"), 1), lag(log("drivers"), 12), log("PetrolPrice"), "law"],
  ],
  seatbelts_static_seasonal: ["month", log("drivers"), [log("kms"), log("PetrolPrice"), "law", seasonal()]],
  ukgas_trend_seasonal_lag: ["quarter", log("gas"), [trend(), seasonal(), lag(log("gas"))]],
};

/** A case from its raw file, under the classical covariance. */
export async function fitCase(name: string): Promise<Fit> {
  const [time, outcome, terms] = specifications[name]!;
  const table = await load(fixturePath(`reference/estimate/cases/${name}.csv`), { time });
  return fit(table, outcome, terms, { covariance: classical() });
}
