import assert from "node:assert/strict";
import { test } from "node:test";
import { counterRandom, fft, matrix, symmetricEigenvalues } from "../../../src/numeric/index.js";

test("transforms of every length up to 2^18 agree with the sum they stand for and come back", () => {
  for (let power = 0; power <= 18; power++) {
    const n = 2 ** power;
    const x = counterRandom(1, power).fillNormal(new Float64Array(n));
    const y = counterRandom(2, power).fillNormal(new Float64Array(n));
    const re = x.slice();
    const im = y.slice();
    fft(re, im);
    for (const j of [0, 1, n >> 1, Math.floor(0.37 * n), n - 1]) {
      let a = 0;
      let b = 0;
      for (let t = 0; t < n; t++) {
        const angle = (-2 * Math.PI * ((j * t) % n)) / n;
        a += x[t]! * Math.cos(angle) - y[t]! * Math.sin(angle);
        b += x[t]! * Math.sin(angle) + y[t]! * Math.cos(angle);
      }
      const scale = 1e-13 * Math.sqrt(n) * (1 + power);
      assert.ok(Math.abs(re[j % n]! - a) < scale && Math.abs(im[j % n]! - b) < scale, `n = ${n}, j = ${j}`);
    }
    fft(im, re);
    for (let t = 0; t < n; t += 1 + (n >> 6)) {
      assert.ok(Math.abs(re[t]! / n - x[t]!) < 1e-14 * (10 + power));
    }
  }
});

test("eigenvalues of a matrix of low rank: the zeros do not keep the iteration from ending", () => {
  const n = 120;
  const factor = counterRandom(3, 0).fillNormal(new Float64Array(3 * n));
  const A = matrix(n, n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++)
      for (let f = 0; f < 3; f++) A.data[j * n + i]! += factor[f * n + i]! * factor[f * n + j]!;
  }
  const values = symmetricEigenvalues(A);
  let trace = 0;
  for (let i = 0; i < n; i++) trace += A.data[i * n + i]!;
  assert.ok(Math.abs(values[0]! + values[1]! + values[2]! - trace) < 1e-11 * trace);
  for (let i = 3; i < n; i++) assert.ok(Math.abs(values[i]!) < 1e-12 * trace);
});
