import assert from "node:assert/strict";
import { test } from "node:test";
import {
  bandwidthPath,
  classical,
  covariances,
  defaultEstimator,
  type Fitted,
  hac,
  neweyWest,
  white,
} from "../../../../src/covariance/index.js";
import type { CovarianceEstimator, Regression } from "../../../../src/estimate/index.js";
import { autoregressive, invented, regressionOf, unit } from "../regression.js";

function fitted(regression: Regression, estimator: CovarianceEstimator = defaultEstimator()): Fitted {
  return { regression, outcome: "riders", level: 0.95, estimator, covariance: estimator.on(regression) };
}

const regression = invented(150, 4, 1);
const m = fitted(regression);

test("twelve estimators when none are named; figures are those of each estimator put on alone", () => {
  const c = covariances(m);
  assert.equal(c.kind, "covariances");
  assert.equal(c.estimators.length, 12);
  assert.equal(c.coefficients.length, 4);
  const row = c.coefficient("x2");
  assert.equal(row.intervals.length, 12);
  const at = c.estimators.findIndex(({ kind }) => kind === "newey-west");
  const covariance = neweyWest().on(regression);
  const law = covariance.reference(unit(4, 2));
  const se = Math.sqrt(covariance.matrix.data[2 * 4 + 2]!);
  const interval = row.intervals[at]!;
  assert.equal(interval.se, se);
  assert.equal(interval.low, row.estimate - law.critical(0.95) * se);
  assert.equal(interval.p, law.twoSided(row.estimate / se));
  assert.equal(interval.law, law.name);
  assert.equal(interval.ratio, se / row.classicalSe);
  const first = row.intervals[0]!;
  assert.equal(first.ratio, 1);
  assert.equal(first.widthRatio, 1);
});

test("sorted by sensitivity, or in the fit's order; chosen terms only; another level", () => {
  const c = covariances(m);
  for (let i = 1; i < c.coefficients.length; i++) {
    assert.ok(c.coefficients[i - 1]!.sensitivity >= c.coefficients[i]!.sensitivity);
  }
  const order = covariances(m, [classical(), neweyWest()], {
    sort: "order",
    terms: ["x3", "x1"],
    level: 0.5,
  });
  assert.deepEqual(
    order.coefficients.map(({ term }) => term),
    ["x3", "x1"],
  );
  assert.equal(order.level, 0.5);
  const options = covariances(m, { terms: ["x1"] });
  assert.equal(options.coefficients.length, 1);
  assert.throws(() => covariances(m, { terms: ["x9"] }), /covariances: the fit has no term "x9"/);
  assert.throws(() => covariances(m, []), /the list of estimators is empty/);
  assert.throws(
    () => covariances(m, ["classical" as never]),
    /entry 1 of the list is no covariance estimator/,
  );
  assert.throws(() => covariances(m, { level: 95 }), /level must lie between 0 and 1/);
  assert.throws(() => covariances(5 as never), /the first argument must be a fit/);
});

test("conclusions: under all, under some, under none, in the finding", () => {
  const T = 60;
  const x = autoregressive(T, 0.6, 1);
  const weak = autoregressive(T, 0.6, 2);
  const errors = autoregressive(T, 0.6, 3);
  const y = errors.map((u, t) => 1 + 2 * x[t]! + u);
  const c = covariances(
    fitted(regressionOf([new Float64Array(T).fill(1), x, weak], y, { terms: ["intercept", "fare", "rain"] })),
  );
  const fare = c.coefficient("fare");
  assert.equal(fare.holds, "all");
  assert.equal(fare.apart, fare.judged);
  assert.match(c.finding, /^At 95% fare differs from zero under all 12 estimators; rain /);
  assert.match(
    c.finding,
    /The width changes most for (fare|rain): \d\.\d\d times the classical one under .+\.$/,
  );
  assert.doesNotMatch(c.finding, /intercept/, "the intercept is not what was asked about");
  const rain = c.coefficient("rain");
  const apart = rain.intervals.filter(({ low, high }) => low > 0 || high < 0).length;
  assert.equal(rain.apart, apart);
  assert.equal(rain.holds, apart === 0 ? "none" : apart === 12 ? "all" : "some");
});

test("an estimator that refuses or gives a negative variance stays in, with its reason and no figures", () => {
  const T = 40;
  const pulse = new Float64Array(T);
  pulse[3] = 1;
  const y = Float64Array.from({ length: T }, (_, t) => (t % 2 === 0 ? 1 : -1) + 0.01 * t);
  const r = regressionOf([new Float64Array(T).fill(1), pulse], y, {
    terms: ["level", "pulse"],
    interceptAt: -1,
  });
  const c = covariances(fitted(r), [classical(), white("HC3"), hac({ kernel: "truncated", bandwidth: 1 })]);
  assert.match(c.estimators[1]!.refused!, /leverage one/);
  const level = c.coefficient("level");
  assert.equal(level.intervals[1]!.conclusion, "none");
  assert.equal(level.intervals[2]!.conclusion, "none");
  assert.ok(Number.isNaN(level.intervals[2]!.se));
  assert.equal(level.judged, 1);
  const record = JSON.parse(JSON.stringify(c)) as { coefficients: { intervals: { se: number | null }[] }[] };
  assert.equal(record.coefficients[0]!.intervals[1]!.se, null);
  assert.ok(c.remarks.some(({ text }) => /White HC3 gives nothing here/.test(text)));
  assert.ok(c.remarks.some(({ text }) => /came out negative/.test(text)));
  assert.equal(c.remarks[0]!.severity, "caution", "cautions come before notes");
});

test("fifteen estimators by thirty coefficients", () => {
  const many = fitted(invented(400, 30, 9));
  const list = Array.from({ length: 15 }, (_, i) => neweyWest({ lags: i }));
  const c = covariances(many, list, { terms: many.regression.terms.slice(0, 30) });
  assert.equal(c.coefficients.length, 30);
  assert.ok(
    c.coefficients.every(({ intervals }) => intervals.length === 15 && intervals.every(({ se }) => se > 0)),
  );
  assert.ok(c.finding.length < 700, `${c.finding.length} characters`);
});

test("the bandwidth path equals the estimator at every bandwidth, for every kernel", () => {
  for (const kernel of [
    "bartlett",
    "parzen",
    "quadratic spectral",
    "tukey-hanning",
    "truncated",
    "daniell",
  ] as const) {
    const path = bandwidthPath(m, "x1", { kernel });
    assert.equal(path.kind, "bandwidth-path");
    assert.equal(path.bandwidths.length, 76);
    for (const S of [1, 2, 9, 40, 75]) {
      const variance = hac({ kernel, bandwidth: S }).on(regression).matrix.data[4 + 1]!;
      const se = path.se[path.bandwidths.indexOf(S)]!;
      if (variance > 0) assert.ok(Math.abs(se / Math.sqrt(variance) - 1) < 1e-11, `${kernel} at ${S}`);
      else assert.ok(Number.isNaN(se));
    }
    assert.equal(path.se[0], path.se[0]);
    const hc0 = Math.sqrt((white("HC0").on(regression).matrix.data[5]! * 150) / 146);
    assert.ok(Math.abs(path.se[0]! / hc0 - 1) < 1e-12, "bandwidth 0 weighs no lag");
    for (const { bandwidth, se } of path.marks) {
      const own = hac({ kernel, bandwidth }).on(regression).matrix.data[5]!;
      assert.ok(Number.isNaN(se) || Math.abs(se / Math.sqrt(own) - 1) < 1e-11);
    }
  }
});

test("a path marks what each rule would choose; on a long sample other kernels are thinned out, and it is said", () => {
  const path = bandwidthPath(m, "x1");
  assert.deepEqual(
    path.marks.map(({ rule }) => rule),
    ["Andrews' plug-in", "Newey–West (1994) plug-in", "1.3 √T", "0.75 T^(1/3)"],
  );
  assert.equal(path.marks[2]!.bandwidth, 16);
  assert.equal(bandwidthPath(m, "x1", { kernel: "daniell" }).marks.length, 3);
  assert.match(
    path.finding,
    /^Over all bandwidths the standard error of x1 varies by a factor of \d\.\d\d \(Bartlett\)/,
  );
  assert.throws(() => bandwidthPath(m, "x7"), /bandwidthPath: the fit has no term "x7"/);
  assert.throws(() => bandwidthPath(m, "x1", { kernel: "bartlet" as never }), /Did you mean "bartlett"\?/);
  const long = fitted(invented(20_000, 2, 4));
  assert.equal(bandwidthPath(long, "x1").bandwidths.length, 10_001);
  const thin = bandwidthPath(long, "x1", { kernel: "parzen" });
  assert.ok(thin.bandwidths.length < 10_001 && thin.bandwidths.length > 100);
  assert.ok(thin.remarks.some(({ text }) => /of the 10001 whole bandwidths are shown/.test(text)));
});
