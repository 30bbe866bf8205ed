// Expected values: make_kolmogorov.py (80-digit arithmetic up to n = 300, scipy beyond).
import assert from "node:assert/strict";
import { test } from "node:test";
import { kolmogorovUpper, kolmogorovUpperQuantile } from "../../../src/diagnose/laws/kolmogorov.js";
import { fixture } from "../../root.js";
import { agree } from "./subject.js";

const { rows } = fixture<{ rows: [number, number, number, string][] }>("reference/diagnose/kolmogorov.json");

test("the exact law: 10 digits up to n = 300, 5 beyond, 6 in the far tail at any n", () => {
  for (const [n, d, upper] of rows) {
    const far = n * d * d > 4;
    const digits = far ? (n > 300 ? 6 : 5) : n <= 300 ? 10 : 5;
    agree(kolmogorovUpper(d, n), upper, digits, `n ${n}, √n·d ${(d * Math.sqrt(n)).toFixed(3)}`);
  }
});

test("ends and quantiles", () => {
  assert.equal(kolmogorovUpper(1, 20), 0);
  assert.equal(kolmogorovUpper(0.5 / 20, 20), 1);
  for (const n of [11, 90, 2000])
    for (const p of [0.1, 0.05, 0.01])
      agree(kolmogorovUpper(kolmogorovUpperQuantile(p, n), n), p, 8, `quantile ${p} at ${n}`);
});
