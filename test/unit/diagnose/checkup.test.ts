import assert from "node:assert/strict";
import { test } from "node:test";
import { checkup } from "../../../src/diagnose/checkup.js";
import { InputError } from "../../../src/numeric/index.js";
import { fitted, noise, regression } from "./subject.js";

const ones = (n: number) => new Array<number>(n).fill(1);
const questions = ["dependence", "form", "integration", "leverage", "spread", "stability"];

test("a sound specification: every question is asked, nothing is found, tests are counted", () => {
  const T = 160;
  const x = noise(T, 1);
  const e = noise(T, 2);
  const found = checkup(
    fitted(
      regression(
        x.map((v, t) => v + e[t]!),
        [ones(T), x],
        { terms: ["intercept", "fare"] },
      ),
    ),
  );
  assert.deepEqual(found.lines.map((line) => line.question).sort(), questions);
  assert.equal(found.coefficient, "fare");
  assert.match(
    found.finding,
    /^Nothing found against the specification \(\d\d tests computed, 5 of them decide/,
  );
  assert.ok(
    found.lines.every((line) => !line.concern && line.attempt === undefined && line.matters.length > 0),
  );
  assert.equal(found.testsRun, found.tests.filter((t) => !Number.isNaN(t.p)).length);
  assert.deepEqual(JSON.parse(JSON.stringify(found)).kind, "checkup");
});

test("each fault leads the list with a call to try", () => {
  const T = 200;
  const x = noise(T, 3);
  const e = noise(T, 4);
  const dependent = e.slice();
  for (let t = 1; t < T; t++) dependent[t]! += 0.7 * dependent[t - 1]!;
  const uneven = e.map((v, t) => v * (0.3 + (3 * t) / T));
  const first = (y: Float64Array) =>
    checkup(fitted(regression(y, [ones(T), x], { terms: ["intercept", "fare"] }))).lines[0]!;
  const one = first(x.map((v, t) => v + dependent[t]!));
  assert.equal(one.question, "dependence");
  assert.match(one.attempt!, /^covariances\(m, undefined, \{ terms: \["fare"\] \}\)$/);
  assert.match(one.matters, /standard error of fare [\d.]+ times/);
  const two = first(x.map((v, t) => v + uneven[t]!));
  assert.equal(two.question, "spread");
  assert.equal(two.attempt, 'm.under(white("HC3"))');
  const three = first(x.map((v, t) => (t < 100 ? 1 : 3) * v + e[t]!));
  assert.equal(three.question, "stability");
  assert.match(three.matters, /fare is (0\.\d+|1\.\d+), then [23]\.\d+/);
  assert.match(three.attempt!, /step\("/);
});

test("Holm over the deciding tests: adjusted p-values are no smaller, and one weak concern is said to stand only on its own", () => {
  for (let seed = 1; seed < 60; seed++) {
    const T = 80;
    const found = checkup(fitted(regression(noise(T, seed), [ones(T), noise(T, seed + 500)])), { draws: 99 });
    for (const line of found.lines)
      assert.ok(Number.isNaN(line.p) ? Number.isNaN(line.adjusted) : line.adjusted >= line.p);
    const weak = found.lines.filter((line) => line.p < 0.05 && line.adjusted >= 0.05);
    if (weak.length === 0) continue;
    assert.match(found.finding, /(own)/);
    return;
  }
  assert.fail("no weak concern in 60 draws");
});

test("size of the whole: at least one firm concern in about 5 % of sound fits at most (60 draws)", () => {
  let firm = 0;
  for (let seed = 0; seed < 60; seed++) {
    const T = 100;
    const found = checkup(fitted(regression(noise(T, 700 + seed), [ones(T), noise(T, 900 + seed)])), {
      draws: 99,
    });
    if (found.lines.some((line) => line.adjusted < 0.05)) firm++;
  }
  assert.ok(firm / 60 < 0.15, String(firm / 60)); // 5 % and three Monte Carlo errors of 2.8 points
});

test("the coefficient asked for; two random walks; a lagged outcome; a perfect fit", () => {
  const T = 120;
  const walk = (seed: number) => {
    let at = 0;
    return noise(T, seed).map((v) => (at += v));
  };
  const y = walk(21);
  const x = walk(23);
  const alarmed = checkup(fitted(regression(y, [ones(T), x], { terms: ["intercept", "fare"] })), {
    coefficient: "fare",
  });
  const line = alarmed.lines.find((l) => l.question === "integration")!;
  if (line.concern) assert.equal(alarmed.lines[0]!.question, "integration");
  assert.throws(() => checkup(fitted(regression(y, [ones(T), x])), { coefficient: "fair" }), InputError);
  const lagged = checkup(
    fitted(regression(y.slice(1), [ones(T - 1), y.slice(0, -1)], { laggedOutcome: true })),
  );
  assert.ok(lagged.lines.every((l) => l.finding.length > 0));
  const trend = Array.from({ length: 20 }, (_, t) => t);
  assert.throws(
    () => checkup(fitted(regression(trend, [ones(20), trend]))),
    /checkup: the regression fits its 20 periods exactly/,
  );
});

test("edges: very few periods still give a card", () => {
  const found = checkup(fitted(regression([1, 3, 2, 5, 4, 6.5, 5], [ones(7), [0, 1, 2, 3, 4, 5, 6]])));
  assert.equal(found.lines.length, 6);
  assert.doesNotThrow(() => JSON.stringify(found));
});
