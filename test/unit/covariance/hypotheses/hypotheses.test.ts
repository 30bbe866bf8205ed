import assert from "node:assert/strict";
import { test } from "node:test";
import {
  batches,
  classical,
  combine,
  cosine,
  defaultEstimator,
  type Fitted,
  hac,
  jointly,
  neweyWest,
  white,
} from "../../../../src/covariance/index.js";
import type { CovarianceEstimator, Regression } from "../../../../src/estimate/index.js";
import { fisher } from "../../../../src/numeric/index.js";
import { autoregressive, invented, regressionOf } from "../regression.js";

function fitted(regression: Regression, estimator: CovarianceEstimator = defaultEstimator()): Fitted {
  return { regression, outcome: "riders", level: 0.95, estimator, covariance: estimator.on(regression) };
}

const regression = invented(140, 4, 2);

test("classical: the joint test is the F test of the restricted against the full regression", () => {
  const full = regression;
  const columns = [0, 1, 2, 3].map((j) => full.X.data.subarray(j * 140, (j + 1) * 140));
  const restricted = regressionOf(columns.slice(0, 2), full.y);
  const F = (restricted.rss - full.rss) / 2 / (full.rss / 136);
  const test = jointly(fitted(full, classical()), ["x2", "x3"]);
  assert.ok(Math.abs(test.statistic / F - 1) < 1e-9);
  assert.ok(Math.abs(test.p / fisher.upper(F, 2, 136) - 1) < 1e-8);
  assert.equal(test.law, "F(2, 136)");
  assert.deepEqual(test.restrictions, ["x2 = 0", "x3 = 0"]);
  assert.equal(test.q, 2);
});

test("one restriction is the t test squared, under every law by table", () => {
  for (const estimator of [classical(), white("HC1"), cosine(), batches(), hac({ law: "t" })]) {
    const m = fitted(regression, estimator);
    const one = combine(m, { x1: 1 });
    const test = jointly(m, "x1");
    assert.ok(Math.abs(test.wald / one.statistic ** 2 - 1) < 1e-10, estimator.label);
    assert.ok(Math.abs(test.p / one.p - 1) < 1e-6, estimator.label);
  }
});

test("the Wald statistic does not care how the restrictions are written", () => {
  for (const estimator of [classical(), neweyWest(), cosine()]) {
    const m = fitted(regression, estimator);
    const plain = jointly(m, ["x1", "x2"]);
    const mixed = jointly(m, [
      { x1: 1, x2: 1 },
      { x1: 2, x2: -1e3 },
    ]);
    assert.ok(Math.abs(mixed.wald / plain.wald - 1) < 1e-9);
    assert.ok(Math.abs(mixed.p - plain.p) < 0.01);
  }
});

test("a fixed-b joint p comes with its error, and calm remarks unless q·b is large", () => {
  const test = jointly(fitted(regression, neweyWest()), ["x1", "x2"]);
  assert.ok(test.error! > 0 && test.error! < 0.005);
  assert.match(test.law, /^fixed-b, b = 0\.11, q = 2, on this design, 12000 draws$/);
  assert.ok(!test.remarks.some(({ text }) => /very long tail/.test(text)));
  const strained = jointly(fitted(regression, hac({ bandwidth: 60 })), ["x1", "x2"]);
  assert.ok(strained.remarks.some(({ text }) => /very long tail/.test(text)));
  assert.match(JSON.stringify(test), /"error":/);
});

test("restrictions that equal a number, and the true ones are not rejected", () => {
  const m = fitted(regression, neweyWest());
  const b = regression.coefficients;
  const exact = jointly(m, [
    { weights: { x1: 1 }, equals: b[1]! },
    { weights: { x2: 1, x3: -1 }, equals: b[2]! - b[3]! },
  ]);
  assert.ok(exact.wald < 1e-20);
  assert.ok(exact.p > 0.999);
  assert.match(exact.finding, /not rejected at 95%/);
  assert.match(exact.restrictions[1]!, /^x2 − x3 = /);
});

test("findings say what was found of these terms", () => {
  const T = 80;
  const x = autoregressive(T, 0.3, 1);
  const y = autoregressive(T, 0.3, 2).map((u, t) => u + 3 * x[t]!);
  const m = fitted(
    regressionOf([new Float64Array(T).fill(1), x, autoregressive(T, 0.3, 3)], y, {
      terms: ["intercept", "fare", "rain"],
    }),
  );
  assert.match(
    jointly(m, ["fare", "rain"]).finding,
    /^Together fare and rain differ from zero at 95% \(p < 0\.001\)\.$/,
  );
  assert.match(jointly(m, ["rain"]).finding, /^rain cannot be told from zero at 95% \(p = 0\.\d{3}\)\.$/);
  const sum = combine(m, { fare: 1, rain: 2 });
  assert.equal(sum.label, "fare + 2 × rain");
  assert.match(
    sum.finding,
    /^fare \+ 2 × rain is [\d.−]+, with 95% interval [\d.−]+ to [\d.−]+: it differs from zero/,
  );
});

test("a combination's variance takes in the covariances, under any estimator", () => {
  for (const estimator of [classical(), white("HC3"), neweyWest(), cosine(), batches()]) {
    const m = fitted(regression, estimator);
    const V = m.covariance.matrix;
    const { se, estimate, low, high, kind } = combine(m, { x1: 1, x2: -2 });
    assert.equal(kind, "combination");
    const at = (i: number, j: number): number => V.data[j * 4 + i]!;
    const variance = at(1, 1) + 4 * at(2, 2) - 4 * at(1, 2);
    assert.ok(Math.abs(se / Math.sqrt(variance) - 1) < 1e-12);
    assert.ok(Math.abs((low + high) / 2 - estimate) < 1e-12);
    // A combination of coefficients is the coefficient of a rewritten regression: swap x2 for x2 + x1·½.
    const columns = [0, 1, 2, 3].map((j) => regression.X.data.slice(j * 140, (j + 1) * 140));
    const rewritten = regressionOf(
      [columns[0]!, columns[1]!, columns[2]!.map((v, t) => v + 2 * columns[1]![t]!), columns[3]!],
      regression.y,
    );
    const same = combine(fitted(rewritten, estimator), { x1: 1 });
    assert.ok(
      Math.abs(same.estimate - estimate) < 1e-11 && Math.abs(same.se / se - 1) < 1e-10,
      estimator.label,
    );
  }
});

test("a negative variance gives no interval, and is said", () => {
  const y = Float64Array.from({ length: 40 }, (_, t) => (t % 2 === 0 ? 1 : -1));
  const m = fitted(
    regressionOf([new Float64Array(40).fill(1)], y, { terms: ["level"], interceptAt: -1 }),
    hac({ kernel: "truncated", bandwidth: 1 }),
  );
  const c = combine(m, { level: 2 });
  assert.ok(Number.isNaN(c.se) && Number.isNaN(c.low) && Number.isNaN(c.p));
  assert.match(c.finding, /The variance of 2 × level came out negative/);
  assert.equal((JSON.parse(JSON.stringify(c)) as { se: number | null }).se, null);
  assert.throws(() => jointly(m, ["level"]), /the variance of "level = 0" came out negative/);
});

test("wrong requests are refused with the way out", () => {
  const m = fitted(regression);
  assert.throws(() => jointly(m, ["x1", "x11"]), /jointly: the fit has no term "x11"/);
  assert.throws(() => jointly(m, []), /no restriction given/);
  assert.throws(() => jointly(m, ["x1", { x1: 2 }]), /"2 × x1 = 0" follows from the restrictions before it/);
  assert.throws(() => jointly(m, [{ x1: 0 }]), /every weight is zero/);
  assert.throws(() => combine(m, { x1: "a" as never }), /the weight of "x1" must be a number, not a/);
  assert.throws(() => combine(m, {}), /every weight is zero/);
  assert.throws(() => combine(m, { fare: 1 }), /combine: the fit has no term "fare"/);
  const short = fitted(invented(6, 4, 3));
  assert.throws(
    () => jointly(short, ["x1", "x2", "x3"]),
    /3 restrictions are more than the 2 degrees of freedom/,
  );
  assert.throws(
    () => jointly(fitted(regression, batches({ length: 70 })), ["x1", "x2"]),
    /cannot be tested jointly with 2 batches/,
  );
});
