import assert from "node:assert/strict";
import { test } from "node:test";
import { cosine, defaultEstimator, hac } from "../../../src/covariance/index.js";
import { counterRandom } from "../../../src/numeric/index.js";
import { autoregressive, regressionOf, standardErrors, unit } from "../../unit/covariance/regression.js";

/*
 * Size of nominal 5 % tests by simulation, seeded, Monte Carlo standard error √(0.05·0.95/4000) = 0.0034. With iid normal
 * errors and a fixed bandwidth the fixed-b law on the design at hand is exact, whatever the regressors; standard normal critical values
 * are not.
 */
const replications = 4000;
const error = Math.sqrt((0.05 * 0.95) / replications);
const T = 60;
const ones = new Float64Array(T).fill(1);
const walk = autoregressive(T, 1, 41);
const trend = Float64Array.from({ length: T }, (_, t) => t / T);
const step = Float64Array.from({ length: T }, (_, t) => (t < 40 ? 0 : 1));
const columns = [ones, walk, trend, step];

test("the default estimator has its size on trends, steps and random walks; the normal does not", () => {
  const estimator = defaultEstimator();
  const laws = estimator.on(regressionOf(columns, autoregressive(T, 0, 1)));
  const critical = columns.map((_, a) => laws.reference(unit(4, a)).critical(0.95));
  const rejected = columns.map(() => 0);
  let normal = 0;
  for (let r = 0; r < replications; r++) {
    const m = regressionOf(columns, counterRandom(501, r).fillNormal(new Float64Array(T)));
    standardErrors(estimator.on(m).matrix).forEach((se, a) => {
      const t = Math.abs(m.coefficients[a]! / se);
      if (t > critical[a]!) rejected[a]!++;
      if (a === 1 && t > 1.96) normal++;
    });
  }
  rejected.forEach((count, a) => {
    assert.ok(Math.abs(count / replications - 0.05) < 3 * error, `coefficient ${a}: ${count / replications}`);
  });
  assert.ok(normal / replications > 0.09, `${normal / replications}`);
});

test("a plug-in bandwidth taken as fixed, and cosines: near their size", () => {
  const estimators = [hac({ kernel: "quadratic spectral", bandwidth: "andrews" }), cosine({ factor: false })];
  const rejected = [0, 0];
  const many = 2000;
  for (let r = 0; r < many; r++) {
    const m = regressionOf(
      [ones, autoregressive(T, 0.5, 7)],
      counterRandom(502, r).fillNormal(new Float64Array(T)),
    );
    estimators.forEach((estimator, i) => {
      const covariance = estimator.on(m);
      const se = standardErrors(covariance.matrix)[1]!;
      if (Math.abs(m.coefficients[1]! / se) > covariance.reference(unit(2, 1)).critical(0.95)) rejected[i]!++;
    });
  }
  rejected.forEach((count, i) => {
    assert.ok(Math.abs(count / many - 0.05) < 0.02, `${estimators[i]!.label}: ${count / many}`);
  });
});
