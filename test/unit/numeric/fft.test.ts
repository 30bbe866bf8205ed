import assert from "node:assert/strict";
import { test } from "node:test";
import { unitRoot } from "../../../src/numeric/fourier-factors.js";
import { counterRandom, fft } from "../../../src/numeric/index.js";

test("transforms of every length up to 2^20 agree with the sum they stand for and come back", () => {
  for (let power = 0; power <= 20; power++) {
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

test("two parts of different length, and a length that is no power of two, are refused", () => {
  assert.throws(() => fft(new Float64Array(96), new Float64Array(96)), /a power of two, not 96/);
  assert.throws(() => fft(new Float64Array(128), new Float64Array(64)), /128 and 64/);
});

test("factors all around the circle, and right ones at its quarters", () => {
  const n = 48;
  for (let p = 0; p < 2 * n; p++) {
    const [cos, sin] = unitRoot(p, n);
    assert.ok(Math.abs(cos - Math.cos((2 * Math.PI * p) / n)) < 2e-15, `${p}`);
    assert.ok(Math.abs(sin - Math.sin((2 * Math.PI * p) / n)) < 2e-15, `${p}`);
  }
  assert.deepEqual(
    [unitRoot(12, 48), unitRoot(24, 48)].map(([c, s]) => [c + 0, s + 0]),
    [
      [0, 1],
      [-1, 0],
    ],
  );
});
