import assert from "node:assert/strict";
import { test } from "node:test";
import { varianceInflation } from "../../../src/diagnose/dependence/inflation.js";
import { chooseLags } from "../../../src/diagnose/dependence/lag-choice.js";
import { runs, runsProbability } from "../../../src/diagnose/dependence/runs.js";
import { dependence } from "../../../src/diagnose/index.js";
import { InputError } from "../../../src/numeric/index.js";
import { agree, fitted, noise, regression } from "./subject.js";

const ones = (n: number) => new Array<number>(n).fill(1);
const autoregressive = (n: number, rho: number, seed: number) => {
  const e = noise(n + 200, seed);
  for (let t = 1; t < e.length; t++) e[t]! += rho * e[t - 1]!;
  return e.slice(200);
};

test("dependent errors are found and said, with their sign; white ones are not", () => {
  const x = noise(200, 1);
  const build = (u: Float64Array) =>
    dependence(
      fitted(
        regression(
          x.map((v, t) => 1 + v + u[t]!),
          [ones(200), x],
        ),
      ),
    );
  const positive = build(autoregressive(200, 0.6, 2));
  assert.ok(positive.dependent);
  assert.match(positive.finding, /carry over from one \S+ to the next, with correlation 0\.\d/);
  const negative = build(autoregressive(200, -0.6, 3));
  assert.match(negative.finding, /alternate.*correlation −0\.\d/);
  const white = build(noise(200, 4));
  assert.ok(!white.dependent);
  assert.match(white.finding, /^No dependence found/);
  const json = JSON.parse(JSON.stringify(positive));
  assert.equal(json.kind, "dependence");
  assert.equal(json.tests.length, positive.tests.length);
});

test("a seasonal error is found at the seasonal lag alone, though the joint tests stop short of it", () => {
  const u = noise(208, 5);
  for (let t = 52; t < 208; t++) u[t]! += 0.7 * u[t - 52]!;
  const found = dependence(fitted(regression(u, [ones(208)]), { unit: "week", count: 1 }));
  assert.deepEqual(
    found.named("Breusch–Godfrey F").map((t) => [t.lags, t.note]),
    [
      [1, undefined],
      [10, undefined],
      [52, "lag 52 alone"],
      [104, "lag 104 alone"],
    ],
  );
  assert.ok(found.dependent);
  assert.match(found.finding, /52 weeks earlier/);
  assert.equal(found.acf.length, 104);
});

test("under ARCH errors the finding moves to the robust form", () => {
  const e = noise(600, 6);
  for (let t = 1; t < 600; t++) e[t]! *= Math.sqrt(0.2 + 0.8 * e[t - 1]! ** 2);
  const found = dependence(fitted(regression(e, [ones(600), noise(600, 7)])));
  assert.equal(found.decisive?.name, "Robust LM");
  assert.ok(found.remarks.some((r) => r.text.includes("uneven")));
});

test("variance inflation follows (1+ρλ)/(1−ρλ) for an AR(1) regressor and AR(1) errors", () => {
  // textbook result, large samples; T = 20,000 leaves a few per cent of sampling error
  for (const [rho, lambda] of [
    [0.5, 0.5],
    [0.8, 0.6],
    [-0.5, 0.7],
  ] as const) {
    const x = autoregressive(20_000, lambda, 8);
    const u = autoregressive(20_000, rho, 9);
    const m = regression(
      x.map((v, t) => v + u[t]!),
      [ones(20_000), x],
    );
    const { factors } = varianceInflation(m, m.residuals);
    const want = (1 + rho * lambda) / (1 - rho * lambda);
    assert.ok(
      Math.abs(factors[1]!.factor / want - 1) < 0.08,
      `${rho}, ${lambda}: ${factors[1]!.factor} for ${want}`,
    );
  }
});

test("variance inflation equals w'Ωw / w'w with Ω written out, also across gaps", () => {
  const periods = [0, 1, 2, 3, 7, 8, 9, 10, 11, 30, 31, 32, 33, 34, 35, 36, 37, 38, 39, 40, 41, 42, 43, 44];
  const u = autoregressive(periods.length, 0.8, 10);
  const x = noise(periods.length, 11);
  const m = regression(u, [ones(periods.length), x], { periods });
  const { factors, autoregression, order } = varianceInflation(m, m.residuals);
  assert.equal(order, 1);
  const phi = autoregression[0]!;
  factors.forEach(({ factor }, j) => {
    const w = m.X.data
      .slice(0, m.T)
      .map((_, t) =>
        [0, 1].reduce((sum, i) => sum + m.gramInverse.data[j * 2 + i]! * m.X.data[i * m.T + t]!, 0),
      );
    let above = 0;
    let below = 0;
    for (let s = 0; s < m.T; s++) {
      below += w[s]! ** 2;
      for (let t = 0; t < m.T; t++) above += w[s]! * w[t]! * phi ** Math.abs(periods[s]! - periods[t]!);
    }
    agree(factor, above / below, 8, `factor ${j}`);
  });
});

test("runs: the exact law sums to one and equals counting all orders", () => {
  const counts = new Map<number, number>();
  let all = 0;
  for (let mask = 0; mask < 2 ** 9; mask++) {
    const signs = Array.from({ length: 9 }, (_, i) => ((mask >> i) & 1 ? 1 : -1));
    if (signs.filter((s) => s > 0).length !== 4) continue;
    all++;
    const found = 1 + signs.filter((s, i) => i > 0 && s !== signs[i - 1]).length;
    counts.set(found, (counts.get(found) ?? 0) + 1);
  }
  for (const [r, count] of counts) agree(runsProbability(r, 4, 5), count / all, 12, `${r} runs`);
  assert.ok(Number.isNaN(runs(Float64Array.of(1, 2, 3)).p));
});

test("lags: defaults, seasons, and what is asked for", () => {
  assert.deepEqual(chooseLags(200, 3, undefined), { orders: [1, 10], highest: 10, seasonal: [], shown: 20 });
  assert.deepEqual(chooseLags(200, 3, 12), { orders: [1, 24], highest: 24, seasonal: [12, 24], shown: 24 });
  assert.deepEqual(chooseLags(30, 3, 12).seasonal, [12]);
  assert.deepEqual(chooseLags(8, 2, 4).orders, [1]);
  assert.deepEqual(chooseLags(100, 3, 4, [4, 1]).orders, [1, 4]);
  assert.throws(() => chooseLags(20, 5, undefined, 15), /dependence: lags = 15 .*at most 14/);
  assert.throws(() => chooseLags(20, 5, undefined, 1.5), InputError);
  assert.throws(() => chooseLags(20, 5, undefined, []), InputError);
});

test("edges: perfect fit, constant residuals, few periods, a single degree of freedom", () => {
  const trend = Array.from({ length: 12 }, (_, t) => t);
  assert.throws(
    () =>
      dependence(
        fitted(
          regression(
            trend.map((t) => 3 + 2 * t),
            [ones(12), trend],
          ),
        ),
      ),
    /dependence: the regression fits its 12 periods exactly/,
  );
  // y = x + 5 on x orthogonal to a constant, no intercept: every residual is 5
  const x = trend.map((t) => (t % 2 === 0 ? 1 : -1));
  const constant = dependence(
    fitted(
      regression(
        x.map((v) => v + 5),
        [x],
        { intercept: false },
      ),
    ),
  );
  for (const name of ["Ljung–Box", "Runs"])
    assert.ok(
      constant.named(name).every((t) => Number.isNaN(t.p) && !t.valid && t.note),
      name,
    );
  agree(constant.named("Durbin–Watson")[0]!.statistic + 1, 1, 12, "d of constant residuals");
  const y = [1, 3, 2, 5, 4, 6.5];
  const short = dependence(fitted(regression(y, [ones(6), trend.slice(0, 6)])));
  assert.ok(short.tests.length > 5 && short.finding.length > 0);
  const tight = dependence(fitted(regression(y.slice(0, 3), [ones(3), trend.slice(0, 3)])));
  assert.match(tight.finding, /Too few degrees of freedom/);
});

test("gaps: pairs are neighbours in time, and it is said", () => {
  const u = autoregressive(100, 0.5, 12);
  const periods = Array.from({ length: 100 }, (_, t) => (t < 50 ? t : t + 7));
  const found = dependence(fitted(regression(u, [ones(100)], { periods })));
  assert.match(found.named("Durbin–Watson")[0]!.note!, /98 pairs of neighbours/);
  assert.ok(Number.isNaN(found.named("Cumulative periodogram")[0]!.p));
  assert.ok(found.remarks.some((r) => r.text.startsWith("7 periods are missing")));
});

test("scattered rows, no two of them neighbours, leave the lag-1 tests undefined without failing", () => {
  const periods = Array.from({ length: 40 }, (_, t) => 2 * t);
  const found = dependence(fitted(regression(noise(40, 13), [ones(40)], { periods })));
  assert.ok(Number.isNaN(found.named("Durbin–Watson")[0]!.p));
  assert.ok(found.tests.some((t) => t.valid && Number.isFinite(t.p)));
});
