import assert from "node:assert/strict";
import { test } from "node:test";
import {
  count,
  justifiedDecimals,
  levelText,
  number,
  percent,
  pValue,
  scaleFor,
  significant,
  written,
} from "../../../../src/show/text/figures.js";

/** An estimate and its standard error as a row of a table writes them. */
function row(estimate: number, se: number): [string, string] {
  const scale = scaleFor([estimate], se);
  return [written(estimate, scale), written(se, scale)];
}

test("a standard error justifies two significant digits, three when the first is a 1", () => {
  assert.equal(justifiedDecimals(0.0314), 3);
  assert.equal(justifiedDecimals(0.0123), 4);
  assert.equal(justifiedDecimals(0.0099), 4);
  assert.equal(justifiedDecimals(0.0996), 3); // rounds to 0.100
  assert.equal(justifiedDecimals(23), 0);
  assert.equal(justifiedDecimals(123), 0);
  assert.equal(justifiedDecimals(2345), -2);
});

test("estimate and standard error share their decimals", () => {
  assert.deepEqual(row(-0.01234, 0.0031), ["−0.0123", "0.0031"]);
  assert.deepEqual(row(12345.678, 1020.3), ["12,346", "1020"]);
  assert.deepEqual(row(-421.9, 266.4), ["−422", "266"]);
  assert.deepEqual(row(0.7881, 0.0432), ["0.788", "0.043"]);
  assert.deepEqual(row(5, 0.00012), ["5.000000", "0.000120"]);
});

test("very large and very small figures take one power of ten for both", () => {
  assert.deepEqual(row(1.2e12, 3.4e9), ["1.2000×10¹²", "0.0034×10¹²"]);
  assert.deepEqual(row(1.234e-12, 2.5e-13), ["1.23×10⁻¹²", "0.25×10⁻¹²"]);
  assert.deepEqual(row(-4.2e300, 1e299), ["−4.200×10³⁰⁰", "0.100×10³⁰⁰"]);
});

test("ordinary sizes are written without powers of ten", () => {
  for (const [estimate, se] of [
    [1e6, 1e3],
    [123_456_789, 40],
    [0.00012, 0.00003],
    [1e-4, 1e-6],
  ] as const) {
    for (const text of row(estimate, se)) assert.doesNotMatch(text, /×|e/);
  }
});

test("minus signs are true minus signs, and nothing is minus zero", () => {
  assert.equal(written(-1.5, { decimals: 1, exponent: 0 }), "−1.5");
  assert.equal(written(-0.001, { decimals: 2, exponent: 0 }), "0.00");
  assert.equal(written(-0, { decimals: 0, exponent: 0 }), "0");
  assert.equal(number(-12), "−12");
});

test("what is not a finite number has a sign of its own", () => {
  const scale = { decimals: 2, exponent: 0 };
  assert.equal(written(Number.NaN, scale), "–");
  assert.equal(written(Number.POSITIVE_INFINITY, scale), "∞");
  assert.equal(written(Number.NEGATIVE_INFINITY, scale), "−∞");
  assert.deepEqual(row(2, Number.NaN), ["2.00000", "–"]);
});

test("numbers without a standard error", () => {
  assert.equal(number(0), "0");
  assert.equal(number(12), "12");
  assert.equal(number(12.5), "12.5");
  assert.equal(number(Math.PI), "3.142");
  assert.equal(number(1234567.8), "1,234,568");
  assert.equal(number(1e12), "1,000,000,000,000");
  assert.equal(number(0.000123), "0.000123");
  assert.equal(number(1e-12), "1×10⁻¹²");
  assert.equal(number(1.23456e-12, 3), "1.23×10⁻¹²");
  assert.equal(number(5e-324), "5×10⁻³²⁴");
  assert.equal(number(0.99996), "1.000");
  assert.equal(significant(14.2), "14.20");
  assert.equal(significant(9.9999, 3), "10.0");
});

test("p-values", () => {
  assert.equal(pValue(0.0312), "0.031");
  assert.equal(pValue(0.0009999), "< 0.001");
  assert.equal(pValue(0), "< 0.001");
  assert.equal(pValue(0.001), "0.001");
  assert.equal(pValue(1), "> 0.999");
  assert.equal(pValue(Number.NaN), "–");
});

test("counts, shares and levels", () => {
  assert.equal(count(999), "999");
  assert.equal(count(1000), "1000");
  assert.equal(count(1_000_000), "1,000,000");
  assert.equal(percent(0), "0%");
  assert.equal(percent(0.0004), "< 0.1%");
  assert.equal(percent(0.0235), "2.4%");
  assert.equal(percent(0.37), "37%");
  assert.equal(percent(0.9999), "> 99.9%");
  assert.equal(percent(1), "100%");
  assert.equal(levelText(0.95), "95%");
  assert.equal(levelText(0.999), "99.9%");
});
