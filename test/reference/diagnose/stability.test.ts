// Sources: stability.json (base R by make_stability.R), constants.json (critical values of sup-Wald, CUSUM and CUSUM of
// squares, computed or simulated elsewhere; the limit law of the first published by Andrews 1993, whose printed points
// differ from the exact ones in the second decimal). Digits agreed stand with each check.
import assert from "node:assert/strict";
import { test } from "node:test";
import { kolmogorovLimitUpper } from "../../../src/diagnose/laws/kolmogorov-limit.js";
import { logOddsRange, supWaldUpper } from "../../../src/diagnose/laws/sup-f.js";
import { chow } from "../../../src/diagnose/stability/chow.js";
import { cusum, cusumUpper } from "../../../src/diagnose/stability/cusum.js";
import { cusumOfSquares, cusumSquaresUpper } from "../../../src/diagnose/stability/cusum-squares.js";
import { recursion } from "../../../src/diagnose/stability/recursion.js";
import { recursiveEnd } from "../../../src/diagnose/stability/recursive-coefficients.js";
import { bestPartitions } from "../../../src/diagnose/stability/segments.js";
import { supWald } from "../../../src/diagnose/stability/sup-wald.js";
import { breakSearch } from "../../../src/diagnose/stability/wald-path.js";
import { fixture } from "../../root.js";
import { agree, regression } from "../../unit/diagnose/subject.js";

interface Case {
  y: number[];
  X: number[][];
  dates: number[];
  wald: number[];
  recursive: number[];
  at: number;
  chow: number;
  chowP: number;
  predictive: number;
  predictiveP: number;
  cusum: number;
  squares: number;
  half: number;
  coefficients: number[];
}
const all = fixture<
  Record<"nile" | "seatbelts", Case> & {
    several: { y: number[]; x: number[]; shortest: number } & Record<"one" | "two" | "three", number[]>;
  }
>("reference/diagnose/stability.json");

for (const name of ["nile", "seatbelts"] as const) {
  const c = all[name];
  const m = regression(c.y, c.X);

  test(`base R, ${name}: the Wald statistic at every date, 8 digits; recursive residuals, 9`, () => {
    const search = breakSearch(
      m,
      c.X.map((_, j) => j),
      c.dates,
    );
    assert.deepEqual([...search.dates], c.dates);
    const reductions = search.reductions(m.residuals);
    c.wald.forEach((want, i) => {
      const drop = reductions[i]!;
      agree((drop / (m.rss - drop)) * (m.T - 2 * m.k), want, 8, `Wald ${c.dates[i]}`);
    });
    const found = supWald(m, { draws: 0 });
    agree(found.plain.statistic, Math.max(...c.wald), 8, "largest");
    assert.equal(found.rowsBefore, c.dates[c.wald.indexOf(Math.max(...c.wald))]);
    const pass = recursion(m, m.y);
    assert.equal(pass.residuals.length, m.T - m.k);
    const scale = Math.max(...c.recursive.map(Math.abs));
    c.recursive.forEach((want, i) => {
      assert.ok(Math.abs(pass.residuals[i]! - want) < 1e-9 * scale, `w ${i}`);
    });
    agree(pass.rss[m.T - 1]!, m.rss, 11, "RSS of the whole pass");
  });

  test(`base R, ${name}: Chow in both forms, CUSUM, CUSUM of squares, coefficients of half the sample`, () => {
    const plain = chow(m, c.at);
    agree(plain.statistic, c.chow, 9, "Chow");
    agree(plain.p, c.chowP, 8, "Chow p");
    const predictive = chow(m, m.T - 2);
    if (m.k >= 2) {
      agree(predictive.statistic, c.predictive, 9, "predictive");
      agree(predictive.p, c.predictiveP, 8, "predictive p");
      assert.match(predictive.name, /predictive/);
    }
    const pass = recursion(m, m.y);
    agree(cusum(pass, 0.95).test.statistic, c.cusum, 9, "CUSUM");
    agree(cusumOfSquares(pass, 0.95, 1).test.statistic, c.squares, 9, "CUSUM of squares");
    recursiveEnd(m, 0, c.half - 1).forEach((b, j) => {
      agree(b, c.coefficients[j]!, 8, `coefficient ${j}`);
    });
  });
}

test("several breaks: the dynamic programme finds what trying every pair and triple of dates finds", () => {
  const { y, x, shortest, one, two, three } = all.several;
  const m = regression(y, [x.map(() => 1), x]);
  const found = bestPartitions(m, 3, shortest);
  [one, two, three].forEach((want, i) => {
    assert.deepEqual(found[i + 1]!.breaks, want.slice(0, -1));
    agree(found[i + 1]!.rss, want[want.length - 1]!, 10, `RSS with ${i + 1} breaks`);
  });
  // on a coarse grid with refinement too
  const coarse = bestPartitions(m, 1, shortest, 10);
  assert.deepEqual(coarse[1]!.breaks, one.slice(0, -1));
});

test("sup-Wald law: the exact points for k ≤ 10 and five trims, to the level their 3 decimals fix (0.1 %)", () => {
  const { data } = fixture<{
    supF_critical_values: { data: { by_k_then_trim: Record<string, Record<string, number[]>> } };
  }>("reference/diagnose/constants.json").supF_critical_values;
  for (const [k, trims] of Object.entries(data.by_k_then_trim))
    for (const [trim, points] of Object.entries(trims))
      points.forEach((x, i) => {
        const p = supWaldUpper(x, Number(k), logOddsRange(Number(trim), 1 - Number(trim)));
        agree(p, [0.1, 0.05, 0.01][i]!, 3, `k ${k}, trim ${trim}, x ${x}`);
      });
});

test("sup-Wald law: the seatbelts figure computed elsewhere (19.618218, p 0.005929804, 4 digits more than a table)", () => {
  agree(supWaldUpper(19.61821842211888, 3, logOddsRange(0.15, 0.85)), 0.005929804048609544, 5, "p");
  const m = regression(all.seatbelts.y, all.seatbelts.X);
  const found = supWald(m, { draws: 0 });
  agree(found.plain.statistic, 19.61821842211888, 10, "statistic");
  assert.equal(found.rowsBefore, 64);
  assert.ok(found.plain.p < 0.0059298, "the grid of dates makes it smaller than the continuum's");
});

test("sup-Wald law: falls in x from 1 to 0, far tail included", () => {
  for (const k of [1, 2, 5, 12]) {
    let last = 1;
    for (let x = 0.5; x < 400; x *= 1.3) {
      const p = supWaldUpper(x, k, 3.47);
      assert.ok(p <= last + 1e-9 && p >= 0, `k ${k}, x ${x}: ${p} after ${last}`);
      last = p;
    }
    assert.ok(last < 1e-60);
  }
});

test("CUSUM law: 10, 5 and 1 % at 0.8499, 0.9479 and 1.1430 (Brown, Durbin and Evans 1975, 4 decimals)", () => {
  const { data } = fixture<{ cusum: { data: Record<string, number> } }>(
    "reference/diagnose/constants.json",
  ).cusum;
  for (const [level, a] of Object.entries(data)) agree(cusumUpper(a), Number(level), 3, `a = ${a}`);
});

test("Kolmogorov's limit at its 10, 5, 2.5 and 1 % points, 12 digits", () => {
  const { data } = fixture<{ kolmogorov: { data: Record<string, number> } }>(
    "reference/diagnose/constants.json",
  ).kolmogorov;
  for (const [level, z] of Object.entries(data))
    agree(kolmogorovLimitUpper(z), Number(level), 12, `z = ${z}`);
  assert.ok(Math.abs(kolmogorovLimitUpper(0.999999) - kolmogorovLimitUpper(1.000001)) < 1e-5);
});

test("CUSUM of squares at every row: simulated p at the points simulated elsewhere (200,000 draws), within 4 Monte Carlo errors", () => {
  const { data } = fixture<{ cusumsq_all_r_quantiles: { data: Record<string, number[]> } }>(
    "reference/diagnose/constants.json",
  ).cusumsq_all_r_quantiles;
  data["n_minus_k"]!.forEach((n, i) => {
    for (const [key, level] of [
      ["q90", 0.1],
      ["q95", 0.05],
      ["q99", 0.01],
    ] as const) {
      const p = cusumSquaresUpper(data[key]![i]!, n, 5, 1999);
      assert.ok(
        Math.abs(p - level) < 4 * Math.sqrt((level * (1 - level)) / 1999),
        `n ${n} at ${level}: ${p}`,
      );
    }
  });
});
