import assert from "node:assert/strict";
import { test } from "node:test";
import { type Kernel, kernels, lagWeights, lastLag } from "../../../../src/covariance/kernels.js";
import { bandSum } from "../../../../src/covariance/sums/band.js";
import { cosineSum } from "../../../../src/covariance/sums/cosine.js";
import { kernelSum } from "../../../../src/covariance/sums/kernel-sum.js";
import { bartlettSum } from "../../../../src/covariance/sums/moving.js";
import type { Series } from "../../../../src/covariance/sums/series.js";
import { spectralSum } from "../../../../src/covariance/sums/spectral.js";
import { columnOf, counterRandom, type Matrix, matrix } from "../../../../src/numeric/index.js";

function seriesOf(n: number, k: number, seed: number): Series {
  const random = counterRandom(seed, 0);
  return {
    columns: matrix(n, k, random.fillNormal(new Float64Array(n * k))),
    multiplier: random.fillNormal(new Float64Array(n)),
  };
}

/** Σ_j κ_j Σ_t v_t v'_{t−j}, as the definition has it. */
function byDefinition({ columns, multiplier }: Series, weights: Float64Array): Matrix {
  const { rows: n, columns: k } = columns;
  const result = matrix(k, k);
  const value = (t: number, a: number): number => columnOf(columns, a)[t]! * (multiplier?.[t] ?? 1);
  for (let a = 0; a < k; a++) {
    for (let b = 0; b < k; b++) {
      let sum = 0;
      for (let t = 0; t < n; t++) {
        for (let s = 0; s < n; s++) sum += (weights[Math.abs(t - s)] ?? 0) * value(t, a) * value(s, b);
      }
      result.data[b * k + a] = sum;
    }
  }
  return result;
}

function assertClose(found: Matrix, wanted: Matrix, what: string): void {
  let scale = 0;
  for (let a = 0; a < wanted.rows; a++) scale = Math.max(scale, Math.abs(wanted.data[a * wanted.rows + a]!));
  for (let i = 0; i < wanted.data.length; i++) {
    assert.ok(Math.abs(found.data[i]! - wanted.data[i]!) < 1e-12 * scale, `${what}: entry ${i}`);
  }
  for (let a = 0; a < found.rows; a++) {
    for (let b = 0; b < a; b++) {
      assert.equal(
        found.data[a * found.rows + b],
        found.data[b * found.rows + a],
        `${what}: symmetric to the bit`,
      );
    }
  }
}

test("every road to the sum agrees with the definition, odd and even numbers of columns", () => {
  for (const [n, k] of [
    [1, 1],
    [2, 2],
    [37, 3],
    [130, 4],
  ] as const) {
    const series = seriesOf(n, k, n);
    for (const kernel of Object.values(kernels)) {
      for (const bandwidth of [0.6, 1, 2.5, 7, 11.25, 60, n]) {
        if (bandwidth > n) continue;
        const last = lastLag(kernel, bandwidth, n);
        const weights = lagWeights(kernel, bandwidth, last);
        const wanted = byDefinition(series, weights);
        const where = `${kernel.name}, S = ${bandwidth}, n = ${n}`;
        assertClose(kernelSum(series, kernel, bandwidth), wanted, where);
        assertClose(bandSum(series, weights), wanted, `${where}, filter`);
        assertClose(spectralSum(series, weights), wanted, `${where}, transform`);
      }
    }
  }
});

test("moving sums: any length, longer than the series too, with and without a multiplier", () => {
  const series = seriesOf(60, 2, 5);
  for (const m of [1, 2, 13, 59, 60, 61, 200]) {
    const weights = Float64Array.from({ length: 60 }, (_, j) => Math.max(0, 1 - j / m));
    assertClose(bartlettSum(series, m), byDefinition(series, weights), `m = ${m}`);
    const plain = { columns: series.columns };
    assertClose(bartlettSum(plain, m), byDefinition(plain, weights), `m = ${m}, no multiplier`);
  }
});

test("moving sums over 100,000 periods with large offsets: renewing the sums keeps their drift away", () => {
  const n = 100_000;
  const series = seriesOf(n, 1, 6);
  const column = columnOf(series.columns, 0);
  for (let t = 0; t < n; t++) column[t] = column[t]! + (t < n / 2 ? 1e6 : -1e6);
  const m = 50;
  const kernel: Kernel = kernels.bartlett;
  const slow = bandSum(series, lagWeights(kernel, m, m - 1));
  assert.ok(Math.abs(bartlettSum(series, m).data[0]! / slow.data[0]! - 1) < 1e-12);
});

test("cosines: chirp and direct sums agree, and n need be no power of two", () => {
  for (const n of [50, 97, 1001]) {
    const series = seriesOf(n, 3, n);
    for (const nu of [1, 7, 20]) {
      const wanted = matrix(3, 3);
      for (let j = 1; j <= nu; j++) {
        const lambda = [0, 1, 2].map((a) => {
          let sum = 0;
          for (let t = 0; t < n; t++) {
            sum +=
              columnOf(series.columns, a)[t]! *
              series.multiplier![t]! *
              Math.cos((Math.PI * j * (t + 0.5)) / n);
          }
          return sum;
        });
        for (let a = 0; a < 3; a++)
          for (let b = 0; b < 3; b++) wanted.data[b * 3 + a]! += (2 / nu) * lambda[a]! * lambda[b]!;
      }
      assertClose(cosineSum(series, nu), wanted, `n = ${n}, ν = ${nu}`);
      assertClose(cosineSum(series, nu, 0), wanted, `n = ${n}, ν = ${nu}, chirp`);
    }
  }
});
