import type { Remark } from "../../data/index.js";
import { matrix } from "../../numeric/index.js";
import { congruence } from "../shape/sandwich.js";
import { dot } from "../shape/vectors.js";
import { aboutFit, type Fitted, requireFit } from "../subject.js";
import { figure, percent, pValue } from "../words.js";
import { Combination } from "./combination.js";
import { combinationText, readWeights, type Weights } from "./restrictions.js";

/**
 * A linear combination of coefficients under the covariance estimator that is on: `combine(m, { fare: 1, "fare (t−1)": 1 })`.
 * Its variance takes in the covariances between the coefficients.
 *
 * @throws InputError for unknown terms and weights that are no numbers or all zero.
 */
export function combine(m: Fitted, weights: Weights): Combination {
  requireFit(m, "combine");
  const { terms, coefficients, k } = m.regression;
  const contrast = readWeights(weights, terms, "combine");
  const { covariance, level } = m;
  const label = combinationText(weights);
  const estimate = dot(contrast, coefficients);
  const row = matrix(1, k, Float64Array.from(contrast));
  const variance = congruence(row, covariance.matrix).data[0]!;
  const about = {
    about: aboutFit(m),
    outcome: m.outcome,
    label,
    weights,
    level,
    estimate,
    estimator: covariance.label,
  };
  const { remarks } = covariance;
  if (!(variance > 0)) {
    const none = Number.NaN;
    const remark: Remark = {
      severity: "caution",
      text: `The variance of ${label} came out negative: no standard error, interval or p.`,
    };
    const figures = { se: none, low: none, high: none, statistic: none, p: none, law: "" };
    return new Combination({ ...about, ...figures, finding: remark.text, remarks: [remark, ...remarks] });
  }
  const se = Math.sqrt(variance);
  const law = covariance.reference(contrast);
  const reach = law.critical(level) * se;
  const statistic = estimate / se;
  const p = law.twoSided(statistic);
  const low = estimate - reach;
  const high = estimate + reach;
  const apart = low > 0 || high < 0;
  const finding =
    `${label} is ${figure(estimate)}, with ${percent(level)} interval ${figure(low)} to ${figure(high)}: ` +
    `${apart ? "it differs from zero" : "it cannot be told from zero"} (${pValue(p)}).`;
  return new Combination({ ...about, se, low, high, statistic, p, law: law.name, finding, remarks });
}
