import assert from "node:assert/strict";
import { test } from "node:test";
import { cointegration } from "../../../src/diagnose/cointegration.js";
import type { SeriesSource } from "../../../src/diagnose/integration/series.js";
import { integration } from "../../../src/diagnose/integration.js";
import { spuriousAlarm } from "../../../src/diagnose/spurious.js";
import { InputError } from "../../../src/numeric/index.js";
import { noise, regression } from "./subject.js";

const ones = (n: number) => new Array<number>(n).fill(1);
const walk = (n: number, seed: number) => {
  let at = 0;
  return noise(n, seed).map((e) => (at += e));
};

/** A table of columns over periods 0, 1, 2, ... */
function table(columns: Record<string, Float64Array>, ordinals?: readonly number[]): SeriesSource {
  const T = Object.values(columns)[0]!.length;
  return {
    index: {
      step: { unit: "integer", count: 1 },
      name: "time",
      ordinals: Float64Array.from(ordinals ?? Array.from({ length: T }, (_, t) => t)),
    },
    numbers(name) {
      const found = columns[name];
      if (!found) throw new InputError(`no column "${name}"`);
      return found;
    },
  };
}

test("the joint reading: noise is stationary, noise on a trend is stationary around it, a walk is integrated of order one", () => {
  const e = noise(250, 1);
  const twice = walk(250, 2);
  for (let t = 1; t < 250; t++) twice[t]! += twice[t - 1]!;
  const source = table({ noise: e, trending: e.map((v, t) => v + 0.1 * t), walk: walk(250, 3), twice });
  const found = integration(source, ["noise", "trending", "walk", "twice"]);
  assert.deepEqual(
    found.series.map((s) => s.reading),
    ["stationary", "stationary around a trend", "integrated of order one", "integrated of order two or more"],
  );
  assert.match(found.finding, /noise reads as stationary; trending reads as stationary around a trend/);
  assert.equal(found.tests.length, 28);
  assert.match(
    integration(source, "walk").finding,
    /^walk reads as integrated of order one: ADF p = 0\.\d{3} about a level/,
  );
  assert.doesNotThrow(() => JSON.stringify(found));
});

test("integration refuses gaps, missing values in between, constant and short columns; ends are trimmed and said", () => {
  const y = walk(60, 4);
  const holed = y.slice();
  holed[20] = Number.NaN;
  assert.throws(
    () => integration(table({ fare: holed }), "fare"),
    /integration: "fare" is missing in .*\.fill\("fare"/,
  );
  const ordinals = Array.from({ length: 60 }, (_, t) => (t < 30 ? t : t + 3));
  assert.throws(() => integration(table({ fare: y }, ordinals), "fare"), /no row between/);
  assert.throws(() => integration(table({ fare: new Float64Array(60).fill(3) }), "fare"), /constant/);
  assert.throws(() => integration(table({ fare: y.slice(0, 4) }), "fare"), InputError);
  assert.throws(() => integration(table({ fare: y }), []), /no column named/);
  const late = y.slice();
  late.fill(Number.NaN, 0, 3);
  const found = integration(table({ fare: late }), "fare");
  assert.equal(found.series[0]!.T, 57);
  assert.match(found.remarks[0]!.text, /3 periods at the ends without fare/);
  assert.throws(
    () => integration(table({ t: Float64Array.from({ length: 40 }, (_, i) => i) }), "t"),
    InputError,
  );
});

test("cointegration: a pair that shares a walk, a pair that does not, and relations that are exact", () => {
  const x = walk(200, 5);
  const e = noise(200, 6);
  const together = cointegration(table({ y: x.map((v, t) => 2 * v + 1 + e[t]!), x }), ["y", "x"]);
  assert.ok(together.cointegrated);
  assert.match(together.finding, /^y keeps to a relation with x \((1\.9\d|2\.0\d) per unit of x\)/);
  assert.equal(together.residuals.length, 200);
  const apart = cointegration(table({ y: walk(200, 7), x }), ["y", "x"], { trend: true });
  assert.ok(!apart.cointegrated);
  assert.equal(apart.relation.length, 3);
  assert.throws(() => cointegration(table({ y: x.map((v) => 3 * v), x }), ["y", "x"]), /exact combination/);
  assert.throws(
    () => cointegration(table({ y: walk(200, 8), x, z: x.map((v) => 1 - v) }), ["y", "x", "z"]),
    /exact combination of the other explaining columns/,
  );
  assert.throws(() => cointegration(table({ x }), ["x"]), /1 column given/);
});

test("the alarm fires on independent random walks and is silent on a stationary pair (300 draws each, T = 100)", () => {
  let fired = 0;
  let telling = 0;
  let firedWhereTelling = 0;
  let wrongly = 0;
  for (let i = 0; i < 300; i++) {
    const m = regression(walk(100, 2000 + i), [ones(100), walk(100, 5000 + i)]);
    const t = m.coefficients[1]! / Math.sqrt((m.rss / 98) * m.gramInverse.data[3]!);
    const alarm = spuriousAlarm(m) !== undefined;
    if (alarm) fired++;
    if (Math.abs(t) > 2) {
      telling++;
      if (alarm) firedWhereTelling++;
    }
    const x = noise(100, 8000 + i);
    const u = noise(100, 9000 + i);
    if (
      spuriousAlarm(
        regression(
          x.map((v, s) => v + u[s]!),
          [ones(100), x],
        ),
      )
    )
      wrongly++;
  }
  // Measured with 400 draws (MC error 2.4 points): 63 % of pairs of walks; 81 % of those with a classical |t| above 2;
  // 0 % of independent white pairs; 3 % of pairs with AR(0.8) on both sides; 4 % of pairs that share a walk.
  assert.ok(Math.abs(fired / 300 - 0.63) < 0.09, `fired ${fired / 300}`);
  assert.ok(firedWhereTelling / telling > 0.7, `where it misleads: ${firedWhereTelling / telling}`);
  assert.equal(wrongly, 0);
});

test("the alarm stays out of lagged outcomes, gaps, short samples and cointegrated pairs", () => {
  const y = walk(100, 11);
  const x = walk(100, 12);
  const laggedOutcome = regression(y, [ones(100), x], { laggedOutcome: true });
  assert.equal(spuriousAlarm(laggedOutcome), undefined);
  assert.equal(spuriousAlarm(regression(y.slice(0, 15), [ones(15), x.slice(0, 15)])), undefined);
  const periods = Array.from({ length: 100 }, (_, t) => (t < 50 ? t : t + 5));
  assert.equal(spuriousAlarm(regression(y, [ones(100), x], { periods })), undefined);
  const e = noise(100, 13);
  assert.equal(
    spuriousAlarm(
      regression(
        x.map((v, t) => v + e[t]!),
        [ones(100), x],
      ),
    ),
    undefined,
  );
});
