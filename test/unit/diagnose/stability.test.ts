import assert from "node:assert/strict";
import { test } from "node:test";
import { autocorrelations } from "../../../src/diagnose/dependence/correlogram.js";
import { autoregression, drawErrors, innovationsOf } from "../../../src/diagnose/stability/error-process.js";
import { dependenceReach } from "../../../src/diagnose/stability/residual-cusum.js";
import { supWald } from "../../../src/diagnose/stability/sup-wald.js";
import { stability } from "../../../src/diagnose/stability.js";
import { InputError } from "../../../src/numeric/index.js";
import { fixture } from "../../root.js";
import { fitted, noise, regression } from "./subject.js";

const ones = (n: number) => new Array<number>(n).fill(1);

test("the Nile's flow about its mean: one break, after 1898 (Cobb 1978)", () => {
  const { nile } = fixture<{ nile: { y: number[] } }>("reference/diagnose/stability.json");
  const periods = nile.y.map((_, t) => 1871 + t);
  const m = regression(nile.y, [ones(100)], { periods });
  const found = stability({ ...fitted(m, { unit: "year", count: 1 }), outcome: "flow" });
  assert.ok(found.unstable);
  assert.deepEqual(
    found.breaks.map((b) => b.at),
    [1899],
  );
  assert.equal(found.numberOfBreaks.byBic, 1);
  assert.match(found.finding, /change at .*1899.*; intercept goes from 1098 to 850/);
  assert.equal(found.regimes.length, 2);
  assert.ok(found.recursive[0]!.points.length > 50);
  assert.doesNotThrow(() => JSON.stringify(found));
});

test("a break in one slope is dated; a stable relation has none", () => {
  const T = 200;
  const x = noise(T, 1);
  const u = noise(T, 2);
  const broken = regression(
    x.map((v, t) => (t < 120 ? 1 : 2.5) * v + u[t]!),
    [ones(T), x],
    { terms: ["intercept", "fare"] },
  );
  const found = stability(fitted(broken));
  assert.ok(found.unstable && Math.abs(found.breaks[0]!.at - 120) <= 6, JSON.stringify(found.breaks));
  assert.match(found.finding, /fare goes from (0\.\d+|1\.\d+) to 2\.\d+/);
  const stable = stability(
    fitted(
      regression(
        x.map((v, t) => v + u[t]!),
        [ones(T), x],
      ),
    ),
  );
  assert.ok(!stable.unstable);
  assert.match(stable.finding, /^No break found/);
  assert.equal(stable.breaks.length, 0);
});

test("dependent errors do not pass for a break in the robust form, and the card says what the plain one would say", () => {
  // a strongly dependent series chosen so that the plain law rejects
  const T = 150;
  for (let seed = 1; seed < 40; seed++) {
    const e = noise(T, seed);
    for (let t = 1; t < T; t++) e[t]! += 0.8 * e[t - 1]!;
    const found = stability(fitted(regression(e, [ones(T)])), { breaks: 1 });
    const [plain, robust] = found.tests;
    if (!(plain!.p < 0.01 && robust!.p > 0.06)) continue;
    assert.ok(!found.unstable);
    assert.ok(found.remarks.some((r) => r.severity === "caution" && r.text.includes("allowing for")));
    return;
  }
  assert.fail("no such series in 40");
});

test("a step that sets in late is held, not broken; Chow at a date; options refused where they make no sense", () => {
  const T = 100;
  const x = noise(T, 3);
  const law = Array.from({ length: T }, (_, t) => +(t >= 92));
  const m = fitted(regression(noise(T, 4), [ones(T), x, law], { terms: ["intercept", "fare", "law"] }));
  const found = stability(m, { at: "40", draws: 99 });
  assert.ok(found.remarks.some((r) => r.text.includes("law")));
  assert.equal(found.named("Chow").length, 1);
  assert.match(found.named("Chow")[0]!.note!, /break at .*40/);
  assert.ok(found.named("Chow, robust")[0]!.p > 0);
  assert.throws(() => stability(m, { at: "0" }), /stability: at = "0" must fall after the first period/);
  assert.throws(() => stability(m, { at: "500" }), InputError);
  assert.throws(() => stability(m, { trim: 0.5 }), /trim = 0.5/);
  assert.throws(() => stability(m, { terms: ["fair"] }), /there is no term "fair"/);
});

test("edges: few periods, a perfect fit, gaps", () => {
  const short = stability(fitted(regression([1, 3, 2, 5, 4, 7], [ones(6), [0, 1, 2, 3, 4, 5]])));
  assert.match(short.finding, /Too few periods/);
  assert.throws(
    () => stability(fitted(regression([1, 2, 3, 4, 5, 6], [ones(6), [0, 1, 2, 3, 4, 5]]))),
    /fits its 6 periods exactly/,
  );
  const periods = Array.from({ length: 80 }, (_, t) => (t < 40 ? t : t + 9));
  const gaps = stability(fitted(regression(noise(80, 5), [ones(80)], { periods })), { draws: 99 });
  assert.ok(gaps.path.every((p) => periods.includes(p.at)));
});

test("drawn errors have the autoregression asked for, are filtered back to their innovations, and come out the same again", () => {
  const phi = autoregression(Float64Array.of(0.7, 0.4));
  // Yule–Walker by hand: φ₂ = (r₂ − r₁²)/(1 − r₁²), φ₁ = r₁(1 − φ₂)
  const second = (0.4 - 0.49) / (1 - 0.49);
  assert.ok(Math.abs(phi[1]! - second) < 1e-12 && Math.abs(phi[0]! - 0.7 * (1 - second)) < 1e-12);
  const T = 100_000;
  const u = drawErrors(phi, 3, 1, new Float64Array(T));
  const r = autocorrelations(
    u,
    u.map((_, t) => t),
    2,
  ).r;
  assert.ok(Math.abs(r[0]! - 0.7) < 0.01 && Math.abs(r[1]! - 0.4) < 0.015, String(r));
  const v = innovationsOf(u, phi);
  assert.ok(Math.abs(v.reduce((sum, x) => sum + x * x, 0) / T - 1) < 0.02);
  assert.deepEqual(drawErrors(phi, 3, 1, new Float64Array(50)), drawErrors(phi, 3, 1, new Float64Array(50)));
  // autocorrelations of no stationary process are drawn in
  const wild = autoregression(Float64Array.of(1.2, -2));
  assert.ok(drawErrors(wild, 1, 1, new Float64Array(2000)).every(Number.isFinite));
  assert.equal(dependenceReach(0, 200), 1);
  assert.ok(dependenceReach(0.8, 200) > 5 && dependenceReach(1, 200) <= 50);
});

test("size of the largest Wald statistic at 5 %: the limit law with its grid correction, T = 100, two coefficients (500 draws, MC error 1 point)", () => {
  const T = 100;
  const x = noise(T, 77);
  let plain = 0;
  let robust = 0;
  const robustDraws = 100;
  for (let i = 0; i < 500; i++) {
    const m = regression(noise(T, 9000 + i), [ones(T), x]);
    const found = supWald(m, { draws: i < robustDraws ? 99 : 0 });
    if (found.plain.p < 0.05) plain++;
    if (found.robust.p <= 0.05) robust++;
  }
  // 5.6 % in a simulation made elsewhere for this design
  assert.ok(plain / 500 > 0.02 && plain / 500 < 0.09, String(plain / 500));
  assert.ok(robust / robustDraws < 0.14, String(robust / robustDraws));
});

test("under AR(0.5) errors the plain law rejects in two of five sound fits, the robust form in about one of twelve (100 draws, MC error 3 points)", () => {
  const T = 100;
  let plain = 0;
  let robust = 0;
  for (let i = 0; i < 100; i++) {
    const e = noise(T + 50, 400 + i);
    for (let t = 1; t < e.length; t++) e[t]! += 0.5 * e[t - 1]!;
    const found = supWald(regression(e.slice(50), [ones(T), noise(T, 600 + i)]), { draws: 99 });
    if (found.plain.p <= 0.05) plain++;
    if (found.robust.p <= 0.05) robust++;
  }
  assert.ok(plain > 25, `plain ${plain}`);
  assert.ok(robust < 18, `robust ${robust}`);
});
