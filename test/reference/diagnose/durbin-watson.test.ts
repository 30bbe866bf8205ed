// Sources: constants.json (bounds computed from eigenvalues and Imhof's integral, 4 decimals; Durbin–Watson 1951 printed
// two of them), cases.json (60-digit arithmetic), durbin_watson.json (make_durbin_watson.py), base R's LakeHuron.
import assert from "node:assert/strict";
import { test } from "node:test";
import { durbinWatson } from "../../../src/diagnose/dependence/durbin-watson.js";
import { durbinWatsonTails } from "../../../src/numeric/index.js";
import { fixture } from "../../root.js";
import { agree, regression } from "../../unit/diagnose/subject.js";

const ones = (n: number) => new Array<number>(n).fill(1);

test("exact law against 60-digit Imhof: 12 digits, from p = 0.5 down to p = 1e-22", () => {
  const { cases } = fixture<{
    cases: Record<string, { y: number[]; X: number[][]; tests: { durbin_watson: Record<string, number> } }>;
  }>("reference/diagnose/cases.json");
  for (const [name, c] of Object.entries(cases)) {
    const m = regression(c.y, c.X);
    const want = c.tests.durbin_watson;
    const { lower, upper } = durbinWatsonTails(want.d!, m.Q);
    agree(lower, want.p_lower_positive_autocorrelation!, 12, `${name} lower`);
    agree(upper, want.p_upper_negative_autocorrelation!, 12, `${name} upper`);
  }
});

test("across gaps: 11 digits against eigenvalues and Imhof's integral", () => {
  const { years, blocks, rows } = fixture<{
    years: number[];
    blocks: number[];
    rows: [string, number, number][];
  }>("reference/diagnose/durbin_watson.json");
  const subjects: Record<string, ReturnType<typeof regression>> = {
    nile: regression(
      years.map((y) => y % 7),
      [ones(years.length), years.map((y) => +(y >= 1899))],
      { periods: years },
    ),
    blocks: regression(
      blocks.map((b) => b % 3),
      [ones(40), blocks],
      { periods: blocks },
    ),
  };
  for (const [name, d, want] of rows) {
    const m = subjects[name]!;
    const linked = Uint8Array.from(m.periods, (at, t) => +(t > 0 && at - m.periods[t - 1]! === 1));
    const { lower } = durbinWatsonTails(d, m.Q, linked);
    assert.ok(Math.abs(lower - want) < 1e-11, `${name} at ${d}: ${lower} against ${want}`);
  }
});

test("table points: at dL and dU the most and least favourable terms give the table's level, to its 4 decimals", () => {
  // the bounds are attained by terms that are the eigenvectors cos(π j (t − ½)/T) of the matrix of squared differences
  const { data } = fixture<{ durbin_watson_bounds: { data: { rows: number[][] } } }>(
    "reference/diagnose/constants.json",
  ).durbin_watson_bounds;
  for (const [n, extra, ...points] of data.rows as [number, number, ...number[]][]) {
    const wave = (j: number) => Array.from({ length: n }, (_, t) => Math.cos((Math.PI * j * (t + 0.5)) / n));
    const y = Array.from({ length: n }, (_, t) => (t * t) % 11);
    const low = Array.from({ length: extra }, (_, i) => wave(i + 1));
    const high = Array.from({ length: extra }, (_, i) => wave(n - 1 - i));
    const upperBound = regression(y, [ones(n), ...low]);
    const lowerBound = regression(y, [ones(n), ...high]);
    [0.01, 0.025, 0.05].forEach((level, i) => {
      const atL = durbinWatsonTails(points[2 * i]!, lowerBound.Q).lower;
      const atU = durbinWatsonTails(points[2 * i + 1]!, upperBound.Q).lower;
      // half a unit of the fourth decimal moves the level by less than 1 %
      assert.ok(Math.abs(atL / level - 1) < 0.01, `dL(${n}, ${extra}) at ${level}: ${atL}`);
      assert.ok(Math.abs(atU / level - 1) < 0.01, `dU(${n}, ${extra}) at ${level}: ${atU}`);
    });
  }
});

test("LakeHuron in first differences on a constant: d and p to the digits computed elsewhere by two routes", () => {
  const { lakeHuron } = fixture<{ lakeHuron: { y: number[] } }>("reference/diagnose/dependence.json");
  const difference = lakeHuron.y.slice(1).map((v, t) => v - lakeHuron.y[t]!);
  const found = durbinWatson(regression(difference, [ones(difference.length)]));
  assert.ok(Math.abs(found.statistic - 1.69514495) < 5e-9, String(found.statistic));
  assert.ok(Math.abs(found.pPositive - 0.0649854) < 5e-8, String(found.pPositive));
});

test("three periods about their mean: d = 2 − cos 2θ, θ uniform, in closed form", () => {
  const m = regression([1, 3, 2], [ones(3)]);
  for (const d of [1.1, 1.7, 2, 2.6]) {
    const want = 1 - (2 / Math.PI) * Math.asin(Math.sqrt((3 - d) / 2));
    agree(durbinWatsonTails(d, m.Q).lower, want, 9, `d = ${d}`);
  }
});
