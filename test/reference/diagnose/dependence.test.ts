// Two independent sources, both beside this file. cases.json: 60-digit arithmetic on base R datasets (definitions in
// its `conventions`). dependence.json: base R by make_dependence.R. Digits agreed stand with each check.
import assert from "node:assert/strict";
import { test } from "node:test";
import { arch } from "../../../src/diagnose/dependence/arch.js";
import { correlogramBands } from "../../../src/diagnose/dependence/bands.js";
import { breuschGodfrey } from "../../../src/diagnose/dependence/breusch-godfrey.js";
import { autocorrelations, partialAutocorrelations } from "../../../src/diagnose/dependence/correlogram.js";
import { cumbyHuizinga } from "../../../src/diagnose/dependence/cumby-huizinga.js";
import { cumulativePeriodogram } from "../../../src/diagnose/dependence/cumulative-periodogram.js";
import { durbinAlternative } from "../../../src/diagnose/dependence/durbin-alternative.js";
import { durbinWatson } from "../../../src/diagnose/dependence/durbin-watson.js";
import { portmanteau } from "../../../src/diagnose/dependence/portmanteau.js";
import { robustLM } from "../../../src/diagnose/dependence/robust-lm.js";
import { runs } from "../../../src/diagnose/dependence/runs.js";
import { dependence } from "../../../src/diagnose/index.js";
import { unitResiduals } from "../../../src/diagnose/parts/residuals.js";
import { normal } from "../../../src/numeric/index.js";
import { fixture } from "../../root.js";
import { agree, fitted, regression } from "../../unit/diagnose/subject.js";

interface Case {
  terms: string[];
  laggedOutcome: boolean;
  y: number[];
  X: number[][];
  tests: {
    durbin_watson: Record<string, number>;
    breusch_godfrey: Record<string, { zero_padded: Record<string, number> & { F_df: number[] } }>;
    ljung_box: Record<string, Record<string, number>>;
    arch_lm: Record<string, Record<string, number>>;
  };
  acf: number[];
  pacf: number[];
}
const { cases } = fixture<{ cases: Record<string, Case> }>("reference/diagnose/cases.json");

const upTo = (n: number) => Array.from({ length: n }, (_, i) => i + 1);
// Ill-conditioned terms (Longley in years, scaled condition number 43,275) cost the residuals five digits.
const digitsOf = (name: string) => (name === "longley_full" ? 8 : 11);

for (const [name, c] of Object.entries(cases)) {
  const m = regression(c.y, c.X, { laggedOutcome: c.laggedOutcome, terms: c.terms });
  const e = unitResiduals(m, "test");
  const digits = digitsOf(name);

  test(`${name}: Breusch–Godfrey F and LM, and Durbin's alternative`, () => {
    for (const [order, { zero_padded: want }] of Object.entries(c.tests.breusch_godfrey)) {
      const p = Number(order.slice(1));
      const { F, LM } = breuschGodfrey(m, upTo(p))[p - 1]!;
      assert.deepEqual(F.df, want.F_df);
      agree(F.statistic, want.F!, digits, `F ${order}`);
      agree(F.p, want.F_p!, digits - 2, `F p ${order}`);
      agree(LM.statistic, want.LM!, digits, `LM ${order}`);
      agree(LM.p, want.LM_p!, digits - 2, `LM p ${order}`);
      if (p === 1) {
        const alternative = durbinAlternative(m);
        agree(alternative.statistic ** 2, want.F!, digits, "t²");
        agree(alternative.p, want.F_p!, digits - 2, "p of t");
      }
    }
  });

  test(`${name}: autocorrelations, partial ones, Ljung–Box, Box–Pierce`, () => {
    const r = autocorrelations(e, m.periods, Math.min(24, m.T - 1));
    c.acf.forEach((want, i) => {
      assert.ok(Math.abs(r.r[i]! - want) < 10 ** -digits, `r ${i + 1}: ${r.r[i]} against ${want}`);
    });
    const { values } = partialAutocorrelations(r.r);
    c.pacf.forEach((want, i) => {
      assert.ok(
        Math.abs(values[i]! - want) < 10 ** (2 - digits),
        `pacf ${i + 1}: ${values[i]} against ${want}`,
      );
    });
    for (const [h, want] of Object.entries(c.tests.ljung_box)) {
      const { ljungBox, boxPierce } = portmanteau(r, Number(h.slice(1)), 0);
      agree(ljungBox.statistic, want.Q_LB!, digits, `LB ${h}`);
      agree(ljungBox.p, want.p_LB!, digits - 2, `LB p ${h}`);
      agree(boxPierce.statistic, want.Q_BP!, digits, `BP ${h}`);
      agree(boxPierce.p, want.p_BP!, digits - 2, `BP p ${h}`);
    }
  });

  test(`${name}: ARCH LM`, () => {
    for (const [q, want] of Object.entries(c.tests.arch_lm)) {
      const found = arch(e, m.periods, Number(q.slice(1)));
      agree(found.statistic, want.LM!, digits - 1, `ARCH ${q}`);
      agree(found.p, want.LM_p!, digits - 2, `ARCH p ${q}`);
    }
  });

  test(`${name}: Durbin–Watson with its exact law`, () => {
    const found = durbinWatson(m);
    const want = c.tests.durbin_watson;
    agree(found.statistic, want.d!, digits, "d");
    agree(found.pPositive, want.p_lower_positive_autocorrelation!, digits - 2, "lower");
    agree(found.pNegative, want.p_upper_negative_autocorrelation!, digits - 2, "upper");
    agree(found.p, want.p_two_sided!, digits - 2, "two-sided");
    assert.equal(found.valid, !c.laggedOutcome);
  });
}

interface FromR {
  y: number[];
  X: number[][];
  periods: number[];
  pairs: number[];
  products: number[];
  bg: Record<"F" | "pF" | "LM" | "pLM", number>[];
  seasonal: Record<"F" | "pF" | "LM" | "pLM", number>;
  robust: Record<"LM" | "p", number>[];
  ch: { statistic: number; p: number; positive: boolean }[];
  runs: { count: number; z: number; p: number };
  uneven: number[];
  dw: number;
  acf?: number[];
  pacf?: number[];
  lb?: number[];
  bp?: number[];
  periodogram?: { statistic: number; p: number; share: number[] };
}
const fromR = fixture<Record<string, FromR> & { orders: number[] }>("reference/diagnose/dependence.json");
const allowed: Record<string, number> = { seatbelts: 2, nileGaps: 1, nileStep: 1, lakeHuron: 1 };

for (const name of Object.keys(allowed)) {
  const c = fromR[name]!;
  const m = regression(c.y, c.X, { periods: c.periods });
  const e = unitResiduals(m, "test");

  test(`base R, ${name}: auxiliary regressions, 10 digits`, () => {
    fromR.orders.forEach((p, i) => {
      const { F, LM } = breuschGodfrey(m, upTo(p))[p - 1]!;
      agree(F.statistic, c.bg[i]!.F, 10, `F ${p}`);
      agree(F.p, c.bg[i]!.pF, 9, `F p ${p}`);
      agree(LM.p, c.bg[i]!.pLM, 9, `LM p ${p}`);
      const robust = robustLM(m, upTo(p))[p - 1]!;
      agree(robust.statistic, c.robust[i]!.LM, 10, `robust ${p}`);
      agree(robust.p, c.robust[i]!.p, 9, `robust p ${p}`);
      if (!c.ch[i]!.positive) return;
      const beyond = cumbyHuizinga(m, allowed[name]!, p);
      agree(beyond.statistic, c.ch[i]!.statistic, 9, `Cumby–Huizinga ${p}`);
      agree(beyond.p, c.ch[i]!.p, 9, `Cumby–Huizinga p ${p}`);
    });
    const alone = breuschGodfrey(m, [12])[0]!;
    agree(alone.F.statistic, c.seasonal.F, 10, "lag 12 alone");
    agree(alone.LM.statistic, c.seasonal.LM, 10, "lag 12 alone, LM");
  });

  test(`base R, ${name}: lagged products in time, bands, runs, d`, () => {
    const r = autocorrelations(e, m.periods, 20);
    assert.deepEqual([...r.pairs], c.pairs);
    const span = c.periods[c.periods.length - 1]! - c.periods[0]! + 1;
    c.products.forEach((product, i) => {
      const want = product * (m.T / span) * ((span - i - 1) / c.pairs[i]!);
      assert.ok(Math.abs(r.r[i]! - want) < 1e-12, `r ${i + 1}`);
    });
    const bands = correlogramBands(e, m.periods, r, 0.95);
    const z = normal.upperQuantile(0.025);
    if (span === m.T)
      c.uneven.forEach((want, i) => {
        agree(bands.uneven[i]!, z * want, 10, `uneven band ${i + 1}`);
      });
    const found = runs(e);
    agree(found.statistic, c.runs.z, 12, "z of runs");
    agree(found.p, c.runs.p, 11, "p of runs");
    agree(durbinWatson(m).statistic, c.dw, 11, "d");
  });

  if (!c.acf) continue;
  test(`base R, ${name}: acf, pacf, Box.test, ks.test on the cumulative periodogram`, () => {
    const r = autocorrelations(e, m.periods, 20);
    const partial = partialAutocorrelations(r.r).values;
    c.acf!.forEach((want, i) => {
      assert.ok(Math.abs(r.r[i]! - want) < 1e-12, `r ${i + 1}`);
      assert.ok(Math.abs(partial[i]! - c.pacf![i]!) < 1e-11, `pacf ${i + 1}`);
    });
    fromR.orders.forEach((p, i) => {
      const { ljungBox, boxPierce } = portmanteau(r, p, 0);
      agree(ljungBox.statistic, c.lb![i]!, 12, `LB ${p}`);
      agree(boxPierce.statistic, c.bp![i]!, 12, `BP ${p}`);
    });
    const cycle = cumulativePeriodogram(e, m.periods, 0.95);
    agree(cycle.test.statistic, c.periodogram!.statistic, 10, "distance");
    // ks.test computes 1 − P, so below 1e-12 only its rounding is left
    if (c.periodogram!.p > 1e-12) agree(cycle.test.p, c.periodogram!.p, 8, "p of the distance");
    else assert.ok(cycle.test.p < 1e-12);
    c.periodogram!.share.forEach((want, i) => {
      agree(cycle.path[i]!.share, want, 9, `share ${i + 1}`);
    });
  });
}

test("the whole result on the lagged seatbelts case marks what does not hold and rests on what does", () => {
  const c = cases["seatbelts_lags"]!;
  const found = dependence(
    fitted(regression(c.y, c.X, { laggedOutcome: true, terms: c.terms }), { unit: "month", count: 1 }),
    { lags: [1, 4, 12] },
  );
  for (const name of ["Durbin–Watson", "Ljung–Box", "Box–Pierce", "Von Neumann ratio"])
    assert.ok(
      found.named(name).length > 0 && found.named(name).every((t) => !t.valid && t.note),
      `${name} is marked`,
    );
  assert.equal(found.named("Durbin's alternative").length, 1);
  assert.ok(found.decisive?.valid && found.dependent);
  assert.ok(found.remarks.some((r) => r.severity === "caution" && r.text.includes("Lagged outcomes")));
});
