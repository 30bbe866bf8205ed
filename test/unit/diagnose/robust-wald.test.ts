import assert from "node:assert/strict";
import { test } from "node:test";
import { classical, cosine, neweyWest } from "../../../src/covariance/index.js";
import { robustWald } from "../../../src/diagnose/parts/robust-wald.js";
import { fisher } from "../../../src/numeric/index.js";
import { agree, noise, regression } from "./subject.js";

const T = 120;
const m = regression(noise(T, 1), [
  new Array<number>(T).fill(1),
  noise(T, 2),
  noise(T, 3).map((v) => 1e6 * v),
]);

test("one restriction: the square of the t ratio, with that estimator's own p", () => {
  for (const estimator of [classical(), cosine(), neweyWest()]) {
    const covariance = estimator.on(m);
    const t = m.coefficients[1]! / Math.sqrt(covariance.matrix.data[4]!);
    const found = robustWald("x", m, [1], {}, estimator);
    agree(found.statistic, t * t, 10, "W");
    const p = covariance.reference(Float64Array.of(0, 1, 0)).twoSided(t);
    assert.ok(Math.abs(found.p - p) < 0.01, `${estimator.label}: ${found.p} against ${p}`);
  }
});

test("two restrictions under the classical estimator: twice the F of leaving both terms out, whatever the units", () => {
  const without = regression(m.y, [new Array<number>(T).fill(1)]);
  const F = (without.rss - m.rss) / 2 / (m.rss / (T - 3));
  const found = robustWald("x", m, [1, 2], {}, classical());
  agree(found.statistic, 2 * F, 9, "W");
  agree(found.p, fisher.upper(F, 2, T - 3), 9, "p");
});

test("more restrictions than the estimator can bear come back undefined, with the reason", () => {
  const short = regression(noise(8, 4), [
    new Array<number>(8).fill(1),
    ...[5, 6, 7, 8].map((s) => noise(8, s)),
  ]);
  const found = robustWald("x", short, [1, 2, 3, 4]);
  assert.ok(Number.isNaN(found.p) && !found.valid && found.note);
});
