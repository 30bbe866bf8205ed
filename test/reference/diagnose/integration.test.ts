// Sources: integration.json (base R: lm, PP.test, by make_integration.R), constants.json (simulated Dickey–Fuller quantiles,
// MacKinnon's surfaces confirmed by simulation, exact KPSS points). Digits agreed stand with each check.
import assert from "node:assert/strict";
import { test } from "node:test";
import type { Deterministic } from "../../../src/diagnose/integration/deterministic.js";
import { dickeyFuller } from "../../../src/diagnose/integration/dickey-fuller.js";
import { kpss, kpssUpper } from "../../../src/diagnose/integration/kpss.js";
import { phillipsPerron } from "../../../src/diagnose/integration/phillips-perron.js";
import { unitRootCritical, unitRootLower } from "../../../src/diagnose/integration/unit-root-law.js";
import { fixture } from "../../root.js";
import { agree, regression } from "../../unit/diagnose/subject.js";

type Series = Record<
  "y" | "none" | "constant" | "trend" | "chosenConstant" | "chosenTrend" | "kpss" | "pp",
  number[]
> & { stats: number; statsLags: number };
const all = fixture<
  Record<"lakeHuron" | "nile" | "gas" | "kms", Series> & { pair: Record<"y" | "x" | "z" | "tau", number[]> }
>("reference/diagnose/integration.json");

for (const name of ["lakeHuron", "nile", "gas", "kms"] as const) {
  const c = all[name];
  const y = Float64Array.from(c.y);
  test(`base R, ${name}: ADF t ratios, 8 digits, and the lags chosen`, () => {
    for (const kind of ["none", "constant", "trend"] as const)
      [0, 1, 4].forEach((lags, i) => {
        agree(dickeyFuller(y, kind, lags, name).tau, c[kind][i]!, 8, `${kind}, ${lags} lags`);
      });
    (["aic", "bic", "t"] as const).forEach((rule, i) => {
      assert.equal(dickeyFuller(y, "constant", rule, name).lags, c.chosenConstant[i], `${rule}, constant`);
      assert.equal(dickeyFuller(y, "trend", rule, name).lags, c.chosenTrend[i], `${rule}, trend`);
    });
  });

  test(`base R, ${name}: KPSS and Phillips–Perron from their definitions, 9 digits; PP.test, 3`, () => {
    agree(kpss(y, "constant", 3, name).statistic, c.kpss[0]!, 9, "level, 3");
    agree(kpss(y, "constant", 11, name).statistic, c.kpss[1]!, 9, "level, 11");
    agree(kpss(y, "trend", 3, name).statistic, c.kpss[2]!, 9, "trend, 3");
    agree(kpss(y, "trend", 11, name).statistic, c.kpss[3]!, 9, "trend, 11");
    agree(phillipsPerron(y, "constant", 3, name).statistic, c.pp[0]!, 9, "PP constant");
    agree(phillipsPerron(y, "trend", 3, name).statistic, c.pp[1]!, 9, "PP trend");
    // PP.test writes the correction with the determinant of the moment matrix of n, not n−k, periods
    agree(phillipsPerron(y, "trend", c.statsLags, name).statistic, c.stats, 3, "PP.test");
  });
}

test("LakeHuron, figures computed by another program: ADF, Phillips–Perron, KPSS to the digits printed", () => {
  const y = Float64Array.from(all.lakeHuron.y);
  const want = {
    constant: [-2.9380683265, -3.8976683843, -2.5069201383],
    trend: [-3.1383330437, -4.1540644347, -2.779592],
  };
  for (const kind of ["constant", "trend"] as const)
    [0, 1, 4].forEach((lags, i) => {
      assert.ok(Math.abs(dickeyFuller(y, kind, lags, "").tau - want[kind][i]!) < 1e-6, `${kind} ${lags}`);
    });
  agree(phillipsPerron(y, "trend", 3, "").statistic, -3.350746855767229, 9, "PP");
  agree(kpss(y, "constant", 3, "").statistic, 0.9952901144122195, 9, "KPSS level");
  agree(kpss(y, "trend", 3, "").statistic, 0.20006447876896102, 9, "KPSS trend");
});

test("KPSS law: the exact points at 10, 5, 2.5 and 1 %, to the level their 4 decimals fix", () => {
  const { kpss: points } = fixture<{ kpss: { data: Record<"upper_tail" | "level" | "trend", number[]> } }>(
    "reference/diagnose/constants.json",
  );
  points.data.upper_tail.forEach((level, i) => {
    agree(kpssUpper(points.data.level[i]!, "constant"), level, 2.9, `level ${level}`);
    agree(kpssUpper(points.data.trend[i]!, "trend"), level, 2.9, `trend ${level}`);
  });
});

test("Dickey–Fuller p-values against simulated quantiles at T = 50 to 2,000: within 0.002 up to 10 %, 0.015 elsewhere", () => {
  const { data } = fixture<{
    dickey_fuller_t_quantiles: { data: { p: number[]; tab: Record<string, Record<string, number[]>> } };
  }>("reference/diagnose/constants.json").dickey_fuller_t_quantiles;
  const kinds: Record<string, Deterministic> = { nc: "none", c: "constant", ct: "trend" };
  for (const [T, byKind] of Object.entries(data.tab))
    for (const [code, kind] of Object.entries(kinds))
      byKind[code]!.forEach((tau, i) => {
        const p = unitRootLower(tau, Number(T), kind);
        const off = Math.abs(p - data.p[i]!);
        assert.ok(off < (data.p[i]! <= 0.1 ? 0.002 : 0.015), `T ${T}, ${kind}, p ${data.p[i]}: ${p}`);
      });
});

test("surfaces and p-values agree with one another for one to six series: 5 % points give p within 0.007 of 5 %", () => {
  for (const kind of ["constant", "trend"] as const)
    for (let series = 1; series <= 6; series++)
      for (const n of [50, 200, 5000])
        for (const percent of [1, 5, 10] as const) {
          const p = unitRootLower(unitRootCritical(percent, n, kind, series), n, kind, series);
          assert.ok(
            Math.abs(p - percent / 100) < 0.007,
            `${kind}, ${series} series, n ${n}, ${percent} %: ${p}`,
          );
        }
  let last = 0;
  for (let tau = -25; tau < 5; tau += 0.05) {
    const p = unitRootLower(tau, 100, "constant");
    assert.ok(p >= last - 1e-12, `falls at ${tau}`);
    last = p;
  }
});

test("MacKinnon's published asymptotic points (2010): constant −3.43035, −2.86154, −2.56677; two series −3.89644, −3.33613, −3.04445", () => {
  const far = 1e12;
  [1, 5, 10].forEach((percent, i) => {
    assert.ok(
      Math.abs(unitRootCritical(percent as 5, far, "constant") - [-3.43035, -2.86154, -2.56677][i]!) < 1e-9,
    );
    assert.ok(
      Math.abs(unitRootCritical(percent as 5, far, "constant", 2) - [-3.89644, -3.33613, -3.04445][i]!) <
        1e-9,
    );
  });
});

test("Engle–Granger residuals: the t ratios of base R, 8 digits", () => {
  const { y, x, z, tau } = all.pair;
  const m = regression(y, [y.map(() => 1), x, z]);
  [0, 2].forEach((lags, i) => {
    agree(dickeyFuller(m.residuals, "none", lags, "").tau, tau[i]!, 8, `${lags} lags`);
  });
});
