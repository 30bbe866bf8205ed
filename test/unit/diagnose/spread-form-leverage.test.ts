import assert from "node:assert/strict";
import { test } from "node:test";
import { form } from "../../../src/diagnose/form.js";
import { leverage } from "../../../src/diagnose/leverage.js";
import { spread } from "../../../src/diagnose/spread.js";
import { InputError } from "../../../src/numeric/index.js";
import { agree, fitted, noise, regression } from "./subject.js";

const ones = (n: number) => new Array<number>(n).fill(1);
const trend = (n: number) => Array.from({ length: n }, (_, t) => t);

test("spread: growing errors are found and said, even ones are not", () => {
  const T = 200;
  const x = noise(T, 1);
  const growing = noise(T, 2).map((e, t) => e * (0.5 + (2 * t) / T));
  const found = spread(fitted(regression(growing, [ones(T), x])));
  assert.ok(found.uneven);
  assert.match(found.finding, /uneven: \d\.\d times as large in the later half/);
  assert.equal(found.decisive?.name, "Goldfeld–Quandt");
  assert.ok(found.overTime[0]!.size < found.overTime.at(-1)!.size);
  assert.equal(
    found.overTime.reduce((sum, s) => sum + s.n, 0),
    T,
  );
  const even = spread(fitted(regression(noise(T, 3), [ones(T), x])));
  assert.ok(!even.uneven);
  assert.match(even.finding, /^No unevenness/);
});

test("spread: where residuals depend on their past the finding rests on the robust form", () => {
  const T = 300;
  const e = noise(T, 4);
  for (let t = 1; t < T; t++) e[t]! += 0.7 * e[t - 1]!;
  const found = spread(fitted(regression(e, [ones(T), noise(T, 5)])));
  assert.match(found.decisive!.name, /robust to dependence/);
  assert.match(found.named("Koenker")[0]!.note!, /dependent residuals move it/);
  assert.equal(found.remarks.length, 1);
});

test("spread: ordering by a term; an unknown term names the nearest", () => {
  const T = 120;
  const x = noise(T, 6);
  const e = noise(T, 7).map((v, t) => v * Math.exp(x[t]!));
  const m = fitted(regression(e, [ones(T), x], { terms: ["intercept", "fare"] }));
  const byFare = spread(m, { by: "fare" }).named("Goldfeld–Quandt")[1]!;
  assert.ok(byFare.p < 0.001 && byFare.note?.includes("fare"));
  assert.throws(() => spread(m, { by: "fair" }), /spread: there is no term "fair".*Did you mean "fare"/);
});

test("form: a square left out is found by RESET in both forms, and shows in the partial residuals", () => {
  const T = 150;
  const x = noise(T, 8).map((v) => v + 1);
  const y = x.map((v, t) => v + 0.5 * v * v + 0.3 * noise(T, 9)[t]!);
  const bent = form(fitted(regression(y, [ones(T), x])));
  assert.ok(bent.bent);
  for (const name of ["RESET", "RESET, robust"]) assert.ok(bent.named(name)[0]!.p < 0.01, name);
  const means = bent.partialResiduals[0]!.means;
  assert.equal(means.length, 10);
  const bow = means[0]!.y + means[9]!.y - 2 * means[5]!.y;
  assert.ok(bow > 0);
  const straight = form(fitted(regression(noise(T, 10), [ones(T), x])));
  assert.ok(!straight.bent);
  assert.match(straight.finding, /^No bend found/);
  assert.equal(straight.quantiles.length, 101);
  assert.deepEqual(form(fitted(regression(noise(T, 10), [ones(T), x]))).toJSON(), straight.toJSON());
});

test("form: heavy tails are found by Jarque–Bera at T below and above 1,000", () => {
  for (const T of [150, 1500]) {
    const e = noise(T, 11).map((v) => v ** 3);
    const found = form(fitted(regression(e, [ones(T)])));
    assert.ok(found.named("Jarque–Bera")[0]!.p <= 0.001, String(T));
    assert.ok(found.kurtosis > 5);
  }
});

test("leverage: leaving a period out in closed form equals refitting", () => {
  const T = 40;
  const x = noise(T, 12);
  const y = noise(T, 13);
  const all = regression(y, [ones(T), x]);
  const drop = 17;
  const keep = (v: Float64Array) => v.filter((_, t) => t !== drop);
  const rest = regression(keep(y), [ones(T - 1), keep(x)]);
  const found = leverage(fitted(all), { block: 1 });
  const block = found.blocks.find((b) => b.from === drop)!;
  block.coefficients.forEach((b, j) => {
    agree(b, rest.coefficients[j]!, 9, `coefficient ${j}`);
  });
  const sWithout = Math.sqrt(rest.rss / (T - 1 - 2));
  const dfbeta =
    (all.coefficients[1]! - rest.coefficients[1]!) / (sWithout * Math.sqrt(all.gramInverse.data[3]!));
  agree(found.periods[drop]!.dfbetas[1]!, dfbeta, 9, "DFBETAS");
});

test("leverage: a run of odd periods is named; a period with a dummy of its own is said to be fitted exactly", () => {
  const T = 120;
  const x = noise(T, 14);
  const y = x.map((v, t) => v + 0.2 * noise(T, 15)[t]! + (t >= 50 && t < 56 ? 4 * v : 0));
  const m = fitted(regression(y, [ones(T), x], { terms: ["intercept", "fare"] }));
  const found = leverage(m, { block: 6 });
  assert.match(found.finding, /^Leaving out .*(4[789]|5[01]).* moves fare the furthest/);
  const pulse = Array.from({ length: T }, (_, t) => +(t === 30));
  const fixed = leverage(fitted(regression(y, [ones(T), x, pulse])));
  assert.ok(fixed.remarks.some((r) => r.text.includes("fitted exactly")));
  assert.ok(Number.isNaN(fixed.periods[30]!.cook));
  assert.ok(fixed.blocks.some((b) => b.coefficients.every(Number.isNaN)));
  assert.doesNotThrow(() => JSON.stringify(fixed));
  assert.throws(() => leverage(m, { block: 61 }), InputError);
});

test("leverage: long series keep the 500 periods that matter; JSON stays small", () => {
  const T = 3000;
  const found = leverage(fitted(regression(noise(T, 16), [ones(T), noise(T, 17)])));
  assert.equal(found.periods.length, 500);
  assert.ok(found.blocks.length <= 430);
});

test("edges: a perfect fit is refused by each; few periods leave tests undefined with a reason", () => {
  const perfect = fitted(
    regression(
      trend(10).map((t) => 2 * t + 1),
      [ones(10), trend(10)],
    ),
  );
  for (const diagnose of [spread, form, leverage])
    assert.throws(() => diagnose(perfect), /fits its 10 periods exactly/);
  const short = fitted(regression([1, 3, 2, 5, 4], [ones(5), trend(5)]));
  for (const result of [spread(short), form(short), leverage(short)])
    for (const t of result.tests) assert.ok(Number.isFinite(t.p) || t.note, t.name);
  const constantOnly = fitted(regression(noise(30, 18), [ones(30)]));
  assert.ok(Number.isNaN(spread(constantOnly).named("Koenker")[0]!.p));
  assert.ok(Number.isNaN(form(constantOnly).named("RESET")[0]!.p));
});
