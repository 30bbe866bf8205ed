import assert from "node:assert/strict";
import { test } from "node:test";
import {
  batches,
  calibrated,
  classical,
  cosine,
  defaultComparison,
  defaultEstimator,
  hac,
  neweyWest,
  white,
} from "../../../../src/covariance/index.js";
import type { Covariance, Regression } from "../../../../src/estimate/index.js";
import { entry, matrix } from "../../../../src/numeric/index.js";
import { agree } from "../../../support/digits.js";
import { autoregressive, invented, regressionOf, standardErrors, unit } from "../regression.js";

const T = 120;
const ones = new Float64Array(T).fill(1);
const m = invented(T, 3, 1);
const texts = (covariance: Covariance): string => covariance.remarks.map(({ text }) => text).join("\n");

test("the default is Newey–West with bandwidth ⌈1.3 √T⌉, fixed-b law and factor T/(T − k)", () => {
  const covariance = defaultEstimator().on(m);
  assert.equal(covariance.label, "Newey–West, 14 lags (bandwidth 15)");
  assert.equal(covariance.details["rule"], "1.3 √T");
  assert.equal(covariance.details["factor"], T / (T - 3));
  assert.equal(covariance.details["law"], "fixed-b");
  assert.match(covariance.reference(unit(3, 1)).name, /^fixed-b, b = 0\.1[23], on this design$/);
  agree(covariance.matrix.data, neweyWest({ lags: 14 }).on(m).matrix.data, 15);
});

test("lags and bandwidth both stand in every label of a kernel estimator", () => {
  const labels = [
    hac({ bandwidth: 4.5 }),
    hac({ kernel: "truncated", bandwidth: 4 }),
    hac({ kernel: "quadratic spectral", bandwidth: 3 }),
    hac({ kernel: "parzen", bandwidth: 1 }),
    hac({ kernel: "bartlett", bandwidth: "cube-root", prewhiten: true }),
    neweyWest({ lags: 1 }),
  ].map((estimator) => estimator.on(m).label);
  assert.deepEqual(labels, [
    "Bartlett, 4 lags (bandwidth 4.50)",
    "truncated, 4 lags (bandwidth 4)",
    "quadratic spectral, all 119 lags (bandwidth 3)",
    "Parzen, 0 lags (bandwidth 1)",
    "Bartlett (0.75 T^(1/3)), prewhitened, 3 lags (bandwidth 3.70)",
    "Newey–West, 1 lag (bandwidth 2)",
  ]);
});

test("no lags is HC0 times the factor, for Newey–West and every kernel whose weights end", () => {
  const wanted = white("HC0").on(m).matrix.data;
  agree(neweyWest({ lags: 0, factor: false }).on(m).matrix.data, wanted, 13);
  for (const kernel of ["truncated", "bartlett", "parzen", "tukey-hanning"] as const) {
    agree(hac({ kernel, bandwidth: 0.9, factor: false }).on(m).matrix.data, wanted, 13);
  }
  agree(
    white("HC1").on(m).matrix.data,
    wanted.map((value) => (value * T) / (T - 3)),
    14,
  );
});

test("the factor is T/(T − k) or 1, for kernels and cosines", () => {
  const scale = (value: number): number => (value * T) / (T - 3);
  for (const make of [(factor: boolean) => neweyWest({ factor }), (factor: boolean) => cosine({ factor })]) {
    agree(make(true).on(m).matrix.data, make(false).on(m).matrix.data.map(scale), 14);
  }
});

test("laws: t(T − k) for classical and White, t(ν) for cosines, t(G − 1) for batches, F and Hotelling's for joint", () => {
  const two = matrix(2, 3, Float64Array.from([0, 0, 1, 0, 0, 1]));
  assert.equal(classical().on(m).reference(unit(3, 0)).name, "t(117)");
  assert.equal(white().on(m).reference(unit(3, 0)).name, "t(117)");
  assert.equal(classical().on(m).joint(two).name, "F(2, 117)");
  const cosines = cosine({ terms: 8 }).on(m);
  assert.equal(cosines.reference(unit(3, 0)).df, 8);
  assert.deepEqual(cosines.joint(two).df, [2, 7]);
  const batched = batches().on(m);
  assert.equal(batched.label, "8 batches of 15 periods");
  assert.equal(batched.reference(unit(3, 0)).df, 7);
  assert.deepEqual(batched.joint(two).df, [2, 6]);
  assert.equal(hac({ law: "normal" }).on(m).reference(unit(3, 0)).name, "normal");
  assert.equal(hac({ law: "normal" }).on(m).joint(two).name, "χ²(2)");
  assert.equal(hac({ kernel: "truncated", bandwidth: 2 }).on(m).reference(unit(3, 0)).name, "t(117)");
  assert.match(neweyWest({ law: "fixed-b limit" }).on(m).reference(unit(3, 0)).name, /in the limit$/);
});

test("on a constant alone: batches are batch means, cosines exact t under independent errors", () => {
  const y = autoregressive(64, 0, 3);
  const location = regressionOf([new Float64Array(64).fill(1)], y);
  const means = Array.from({ length: 8 }, (_, b) => y.slice(8 * b, 8 * b + 8).reduce((a, v) => a + v, 0) / 8);
  const centre = means.reduce((a, v) => a + v, 0) / 8;
  const variance = means.reduce((a, v) => a + (v - centre) ** 2, 0) / 7 / 8;
  agree(batches({ length: 8 }).on(location).matrix.data, [variance], 13);
});

test("beyond 1,000 periods the law is the limit, except where regressors trend; beyond 50,000 that is said", () => {
  const n = 1500;
  const trend = Float64Array.from({ length: n }, (_, t) => t / n);
  const long = regressionOf(
    [new Float64Array(n).fill(1), trend, autoregressive(n, 0.4, 4)],
    autoregressive(n, 0.4, 5),
  );
  const covariance = neweyWest().on(long);
  assert.match(covariance.reference(unit(3, 1)).name, /on this design$/);
  assert.match(covariance.reference(unit(3, 2)).name, /in the limit$/);
  const trendCritical = covariance.reference(unit(3, 1)).critical(0.95);
  assert.ok(trendCritical > covariance.reference(unit(3, 2)).critical(0.95));
  const limit = neweyWest({ law: "fixed-b limit" }).on(long);
  assert.match(texts(limit), /some here trend or shift/);
  assert.doesNotMatch(texts(covariance), /some here trend or shift/);
});

test("wrong requests are refused with the way out", () => {
  assert.throws(() => neweyWest({ lags: -1 }), /neweyWest: lags must be a whole number from 0 on, not -1/);
  assert.throws(() => neweyWest({ lags: 2.5 }), /not 2.5. The bandwidth of L lags is L \+ 1/);
  assert.throws(() => hac({ bandwidth: -3 }), /hac: a bandwidth is a number above 0, not -3/);
  assert.throws(() => hac({ kernel: "quadratic-spectral" as never }), /Did you mean "quadratic spectral"\?/);
  assert.throws(() => hac({ bandwidth: "squareroot" as never }), /Did you mean "square-root"\?/);
  assert.throws(() => hac({ law: "fixedb" as never }), /there is no law "fixedb"/);
  assert.throws(
    () => hac({ kernel: "tukey-hanning", law: "fixed-b" }),
    /can give a negative variance, so its t ratio has no fixed-b law/,
  );
  assert.throws(
    () => hac({ bandwidth: 121 }).on(m),
    /bandwidth 121 is longer than the sample of 120 periods/,
  );
  assert.throws(() => white("HC5" as never), /there is no type "HC5"/);
  assert.throws(() => cosine({ terms: 0 }), /terms must be a whole number from 1 on/);
  assert.throws(() => cosine({ terms: 118 }).on(m), /118 cosines are more than the 117 degrees of freedom/);
  assert.throws(() => batches({ length: 0 }), /length must be a whole number/);
  assert.throws(
    () => batches({ length: 100 }).on(m),
    /cut 120 into 1, and the variance between batches takes two/,
  );
  assert.throws(() => calibrated({ errors: { ar: [1] } }), /not stationary/);
  assert.throws(() => calibrated({ lags: 1.5 }), /calibrated: lags must be a whole number/);
});

test("more restrictions than the estimator can bear are refused", () => {
  const three = matrix(3, 3, Float64Array.from([1, 0, 0, 0, 1, 0, 0, 0, 1]));
  assert.throws(
    () => cosine({ terms: 2 }).on(m).joint(three),
    /3 restrictions cannot be tested jointly with 2 cosines/,
  );
  assert.throws(
    () => batches({ length: 60 }).on(m).joint(three),
    /3 restrictions cannot be tested jointly with 2 batches/,
  );
  const short = regressionOf(
    [ones.slice(0, 5), autoregressive(5, 0, 1), autoregressive(5, 0, 2)],
    autoregressive(5, 0, 3),
  );
  assert.throws(
    () => neweyWest().on(short).joint(three),
    /3 restrictions are more than the 2 degrees of freedom/,
  );
});

test("an exact fit and T ≤ k are refused", () => {
  const exact = regressionOf([ones, m.X.data.subarray(T, 2 * T)], ones);
  const perfect: Regression = { ...exact, rss: 0 };
  for (const estimator of defaultComparison(T)) {
    assert.throws(() => estimator.on(perfect), /the fit is exact/);
    assert.throws(() => estimator.on({ ...m, k: T }), /leave no degrees of freedom/);
  }
});

test("a period with leverage one: HC2–HC4 refuse and name it, the others say whose error is too small", () => {
  const pulse = new Float64Array(T);
  pulse[40] = 1;
  const x = autoregressive(T, 0.4, 6);
  const base = regressionOf([ones, x, pulse], autoregressive(T, 0.5, 7), {
    terms: ["intercept", "x", "pulse"],
  });
  const named: Regression = { ...base, periodName: (row) => `2020-W${row}` };
  for (const type of ["HC2", "HC3", "HC4"] as const) {
    assert.throws(() => white(type).on(named), /2020-W40 has leverage one/);
  }
  assert.throws(() => white().on(base), /row 41 has leverage one/);
  for (const estimator of [white("HC0"), neweyWest(), cosine(), batches()]) {
    assert.match(
      texts(estimator.on(named)),
      /Leverage one at 2020-W40.*The standard error of pulse is too small/,
    );
  }
  assert.doesNotMatch(texts(classical().on(named)), /Leverage/);
});

test("a negative variance is said, and no standard error comes of it", () => {
  // The alternating residuals of methods-full B.4: γ_0 = 40 and 2γ_1 = −78.
  const y = Float64Array.from({ length: 40 }, (_, t) => (t % 2 === 0 ? 1 : -1));
  const alternating = regressionOf([new Float64Array(40).fill(1)], y, { terms: ["level"] });
  const covariance = hac({ kernel: "truncated", bandwidth: 1, factor: false }).on(alternating);
  assert.ok(Math.abs(entry(covariance.matrix, 0, 0) - -38 / 1600) < 1e-15);
  const [first] = covariance.remarks;
  assert.equal(first?.severity, "caution");
  assert.match(first!.text, /The variance of level came out negative: no standard error, interval or p/);
  assert.ok(standardErrors(hac({ kernel: "parzen", bandwidth: 2 }).on(alternating).matrix)[0]! > 0);
});

test("cautions: bandwidth above T/2, plug-in at its cap, thin data, scores near a unit root, laws that ignore b", () => {
  assert.match(texts(hac({ bandwidth: 61 }).on(m)), /Bandwidth 61.0 is more than half of the 120 periods/);
  assert.doesNotMatch(texts(hac({ bandwidth: 60 }).on(m)), /more than half/);
  const walk = autoregressive(T, 1, 11).map((v) => v + 30);
  const smooth = regressionOf([ones, walk], autoregressive(T, 1, 12), { terms: ["intercept", "walk"] });
  const smoothTexts = texts(hac({ kernel: "bartlett", bandwidth: "andrews" }).on(smooth));
  assert.match(smoothTexts, /The scores of .*near a unit root/);
  const steady = regressionOf(
    [ones],
    Float64Array.from({ length: T }, (_, t) => (t < 60 ? 1 : -1) + 0.001 * (t % 3)),
  );
  assert.match(texts(hac({ bandwidth: "andrews" }).on(steady)), /plug-in is at its cap/);
  assert.match(
    texts(neweyWest().on(invented(100, 4, 2))),
    /100 periods for 4 coefficients: fewer than 30 to a coefficient/,
  );
  assert.doesNotMatch(texts(neweyWest().on(m)), /fewer than 30/);
  for (const estimator of [hac({ law: "t" }), hac({ kernel: "truncated", bandwidth: 3 })]) {
    assert.match(texts(estimator.on(m)), /Critical values ignore the bandwidth/);
  }
  assert.match(
    texts(hac({ bandwidth: "andrews" }).on(m)),
    /comes from the data; the critical values take it as fixed/,
  );
  assert.doesNotMatch(texts(neweyWest().on(m)), /Critical values|comes from the data/);
});

test("missing periods: said by those that count lags in time; prewhitening refuses", () => {
  const periods = Array.from({ length: T }, (_, t) => (t < 50 ? t : t + 3));
  const gappy = regressionOf([ones, autoregressive(T, 0.5, 8)], autoregressive(T, 0.5, 9), { periods });
  for (const estimator of [neweyWest(), cosine(), batches()])
    assert.match(texts(estimator.on(gappy)), /3 periods are missing/);
  assert.throws(() => hac({ prewhiten: true }).on(gappy), /3 periods are missing. Fill them/);
  const law = neweyWest().on(gappy).reference(unit(2, 1));
  assert.ok(law.critical(0.95) > 2 && law.critical(0.95) < 4);
  const scattered = regressionOf([ones, autoregressive(T, 0.5, 8)], autoregressive(T, 0.5, 9), {
    periods: periods.map((p) => p * 100_000),
  });
  assert.throws(() => neweyWest().on(scattered), /too thin for lagged products/);
});

test("calibrated: Newey–West's matrix, a law of its own with the premise named, wider than fixed-b under memory", () => {
  const usual = neweyWest().on(m);
  const covariance = calibrated().on(m);
  assert.deepEqual(covariance.matrix, usual.matrix);
  assert.match(
    covariance.label,
    /^Newey–West, 14 lags \(bandwidth 15\), calibrated to AR\(1\) errors, ρ = 0\.\d{3}$/,
  );
  assert.match(texts(covariance), /exact if the errors are normal and follow AR\(1\) errors/);
  assert.ok(covariance.reference(unit(3, 1)).critical(0.95) > usual.reference(unit(3, 1)).critical(0.95));
  // With independent errors the two laws are one.
  const white = calibrated({ errors: {} }).on(m).reference(unit(3, 1));
  assert.ok(Math.abs(white.critical(0.95) / usual.reference(unit(3, 1)).critical(0.95) - 1) < 3e-4);
  assert.match(calibrated({ errors: { ar: [0.5], ma: [0.2] } }).on(m).label, /AR\(0.5\) MA\(0.2\) errors/);
});

test("same input, same bits", () => {
  const again = invented(T, 3, 1);
  for (const estimator of defaultComparison(T)) {
    const one = estimator.on(m);
    const other = estimator.on(again);
    assert.deepEqual(one.matrix.data, other.matrix.data);
    assert.equal(one.reference(unit(3, 1)).critical(0.95), other.reference(unit(3, 1)).critical(0.95));
    assert.equal(one.reference(unit(3, 1)).twoSided(2.2), other.reference(unit(3, 1)).twoSided(2.2));
  }
  const R = matrix(2, 3, Float64Array.from([0, 0, 1, 0, 0, 1]));
  assert.equal(neweyWest().on(m).joint(R).upper(8), neweyWest().on(again).joint(R).upper(8));
});
