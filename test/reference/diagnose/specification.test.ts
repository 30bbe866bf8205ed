// Sources: cases.json (60-digit arithmetic), specification.json (base R by make_specification.R), constants.json
// (finite-sample points of Jarque–Bera, simulated). Digits agreed stand with each check.
import assert from "node:assert/strict";
import { test } from "node:test";
import { jarqueBera, jarqueBeraStatistic, jarqueBeraUpper } from "../../../src/diagnose/form/jarque-bera.js";
import { quantilePlot } from "../../../src/diagnose/form/quantiles.js";
import { reset } from "../../../src/diagnose/form/reset.js";
import { blockInfluence } from "../../../src/diagnose/leverage/blocks.js";
import { collinearity } from "../../../src/diagnose/leverage/collinearity.js";
import { periodInfluence } from "../../../src/diagnose/leverage/periods.js";
import { unitResiduals } from "../../../src/diagnose/parts/residuals.js";
import { breuschPagan } from "../../../src/diagnose/spread/breusch-pagan.js";
import { goldfeldQuandt } from "../../../src/diagnose/spread/goldfeld-quandt.js";
import { white, whiteOnFitted } from "../../../src/diagnose/spread/white.js";
import { fixture } from "../../root.js";
import { agree, noise, regression } from "../../unit/diagnose/subject.js";

interface Case {
  laggedOutcome: boolean;
  y: number[];
  X: number[][];
  ols: { condition_number_scaled: number };
  tests: {
    koenker_bp: Record<string, number>;
    white: Record<string, Record<string, number> | null> | null;
    reset: Record<string, { F: number; df: number[]; p: number } | null> | null;
    jarque_bera: Record<string, number>;
  };
}
const { cases } = fixture<{ cases: Record<string, Case> }>("reference/diagnose/cases.json");

for (const [name, c] of Object.entries(cases)) {
  const m = regression(c.y, c.X, { laggedOutcome: c.laggedOutcome });
  const digits = name === "longley_full" ? 6 : 9; // scaled condition number 43,275

  test(`${name}: Koenker, Breusch–Pagan, White`, () => {
    if (m.k > 1) {
      const { koenker, koenkerF, breuschPagan: original } = breuschPagan(m);
      const want = c.tests.koenker_bp;
      agree(koenker.statistic, want.LM!, digits, "Koenker");
      agree(koenker.p, want.LM_p!, digits, "Koenker p");
      agree(koenkerF.p, want.F_p!, digits, "Koenker F p");
      agree(original.statistic, want.breusch_pagan_original!, digits, "Breusch–Pagan");
      agree(original.p, want.breusch_pagan_original_p!, digits, "Breusch–Pagan p");
    } else assert.ok(Number.isNaN(breuschPagan(m).koenker.p));
    for (const [form, crossed] of [
      ["with_cross", true],
      ["squares_only", false],
    ] as const) {
      const want = c.tests.white?.[form];
      if (!want || typeof want.LM !== "number") continue;
      const found = white(m, crossed);
      if (m.T < 4 * m.k) {
        assert.ok(Number.isNaN(found.p) && found.note, "refused: too many columns for the periods");
        continue;
      }
      assert.deepEqual(found.df, [want.df], `${form} df`);
      agree(found.statistic, want.LM, digits - 1, `White ${form}`);
      agree(found.p, want.LM_p!, digits - 2, `White ${form} p`);
    }
    const short = c.tests.white?.["special"];
    if (short && typeof short.LM === "number" && m.k > 1)
      agree(whiteOnFitted(m).statistic, short.LM, digits - 1, "White on fitted values");
  });

  test(`${name}: RESET and the moments of Jarque–Bera`, () => {
    for (const [form, want] of Object.entries(c.tests.reset ?? {})) {
      if (!want || typeof want.F !== "number") continue;
      const found = reset(m, Number(form.slice(-1)));
      assert.deepEqual(found.df, want.df, form);
      agree(found.statistic, want.F, digits - 2, form);
      agree(found.p, want.p, digits - 2, `${form} p`);
    }
    const { S, K, JB } = jarqueBeraStatistic(unitResiduals(m, "test"));
    agree(S, c.tests.jarque_bera.skewness!, digits, "skewness");
    agree(K, c.tests.jarque_bera.kurtosis!, digits, "kurtosis");
    agree(JB, c.tests.jarque_bera.JB!, digits - 1, "JB");
  });

  test(`${name}: the scaled condition number`, () => {
    const { conditionIndices } = collinearity(m);
    agree(
      conditionIndices[m.k - 1]!,
      c.ols.condition_number_scaled,
      name === "longley_full" ? 9 : 10,
      "condition",
    );
  });
}

interface FromR {
  y: number[];
  X: number[][];
  hat: number[];
  cook: number[];
  studentised: number[];
  dfbetas: number[][];
  gq: number;
  gqdf: number[];
  gqp: number;
  block: number;
  without: number[][];
  vif: number[];
  indices: number[];
  proportions: number[][];
  quantileLow: number[];
  quantileHigh: number[];
  ordered: number[];
  white: number;
  whiteDf: number;
}
const fromR = fixture<Record<string, FromR>>("reference/diagnose/specification.json");

for (const name of ["seatbelts", "longley"]) {
  const c = fromR[name]!;
  const m = regression(c.y, c.X);
  const digits = name === "longley" ? 6 : 9;

  test(`base R, ${name}: leverage, Cook, studentised residuals, DFBETAS`, () => {
    periodInfluence(m).forEach((p, t) => {
      agree(p.leverage, c.hat[t]!, digits, `h ${t}`);
      agree(p.cook, c.cook[t]!, digits, `Cook ${t}`);
      agree(p.studentised, c.studentised[t]!, digits, `studentised ${t}`);
      p.dfbetas.forEach((d, j) => {
        agree(d, c.dfbetas[t]![j]!, digits - 2, `DFBETAS ${t}, ${j}`);
      });
    });
  });

  test(`base R, ${name}: the fit without each block`, () => {
    blockInfluence(m, c.block).forEach((block, i) => {
      assert.equal(block.from, i);
      block.coefficients.forEach((b, j) => {
        const want = c.without[i]![j]!;
        const undetermined = !Number.isFinite(want) || Number.isNaN(b);
        if (!undetermined) agree(b, want, name === "longley" ? 5 : 8, `block ${i}, coefficient ${j}`);
      });
    });
  });

  test(`base R, ${name}: variance inflation, condition indices, proportions, Goldfeld–Quandt, White`, () => {
    const found = collinearity(m);
    c.vif.forEach((want, j) => {
      agree(found.varianceInflation[j + 1]!.factor, want, digits, `VIF ${j}`);
    });
    c.indices.forEach((want, j) => {
      agree(found.conditionIndices[j]!, want, digits, `index ${j}`);
      c.proportions[j]!.forEach((share, i) => {
        assert.ok(Math.abs(found.proportions[j]![i]! - share) < 1e-6, `share ${j}, ${i}`);
      });
    });
    if (c.gqdf[0]! > 0) {
      const quandt = goldfeldQuandt(m);
      assert.deepEqual(quandt.df, c.gqdf);
      agree(quandt.statistic, c.gq, digits, "Goldfeld–Quandt");
      agree(quandt.p, c.gqp, digits - 1, "its p");
    }
    if (name === "seatbelts") {
      agree(white(m).statistic, c.white, 9, "White");
      assert.deepEqual(white(m).df, [c.whiteDf]);
    }
  });

  test(`base R, ${name}: quantile plot and its band`, () => {
    quantilePlot(m, 0.95, 1000).forEach((point, i) => {
      assert.ok(Math.abs(point.found - c.ordered[i]!) < 10 ** -digits, `ordered ${i}`);
      agree(point.low, c.quantileLow[i]!, 8, `low ${i}`);
      agree(point.high, c.quantileHigh[i]!, 8, `high ${i}`);
    });
  });
}

test("N: seatbelts figures computed by another program: Koenker 9.0577, Breusch–Pagan 6.5710, White 14.3888, RESET 3.41672, JB 7.673683", () => {
  const m = regression(fromR["seatbelts"]!.y, fromR["seatbelts"]!.X);
  const { koenker, breuschPagan: original } = breuschPagan(m);
  agree(koenker.statistic, 9.057736234635364, 9, "Koenker");
  agree(koenker.p, 0.028533019648208757, 9, "Koenker p");
  agree(original.statistic, 6.570965982279278, 9, "Breusch–Pagan");
  agree(white(m).statistic, 14.38877122602107, 9, "White");
  agree(reset(m, 3).statistic, 3.4167176590953217, 9, "RESET");
  agree(reset(m, 3).p, 0.034893646296163434, 9, "RESET p");
  agree(jarqueBera(m, 1).test.statistic, 7.673683315104428, 9, "JB");
  const influence = periodInfluence(m);
  agree(Math.max(...influence.map((p) => p.leverage)), 0.0693958, 5, "largest leverage");
  agree(Math.max(...influence.map((p) => p.cook)), 0.0536258, 5, "largest Cook");
});

test("simulated Jarque–Bera law at the finite-sample points (60,000 draws and more elsewhere): within 4 Monte Carlo errors", () => {
  const { data } = fixture<{ jarque_bera_finite: { data: { rows: number[][] } } }>(
    "reference/diagnose/constants.json",
  ).jarque_bera_finite;
  const draws = 1999;
  for (const [T, ...points] of data.rows as [number, number, number, number][]) {
    if (T > 200) continue;
    const { Q } = regression(noise(T, 3), [new Array<number>(T).fill(1)]);
    [0.1, 0.05, 0.01].forEach((level, i) => {
      const p = jarqueBeraUpper(points[i]!, Q, 7, draws);
      assert.ok(
        Math.abs(p - level) < 4 * Math.sqrt((level * (1 - level)) / draws),
        `T = ${T} at ${level}: ${p}`,
      );
    });
  }
});
