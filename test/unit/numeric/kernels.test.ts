import assert from "node:assert/strict";
import { test } from "node:test";
import fc from "fast-check";
import {
  counterRandom,
  fromColumns,
  laggedProducts,
  movingSumProducts,
  orthonormalBasis,
  solveLeastSquares,
} from "../../../src/numeric/index.js";
import { tallR } from "../../../src/numeric/tall-qr.js";
import { agree } from "../../support/digits.js";
import {
  divideByTrianglePlain,
  gradientPlain,
  laggedProductsPlain,
  movingSumProductsPlain,
  residualPairsPlain,
  tallRPlain,
} from "../../support/plain-kernels.js";

const gaussian = (rows: number, columns: number, seed: number): Float64Array[] =>
  Array.from({ length: columns }, (_, j) => counterRandom(seed, j).fillNormal(new Float64Array(rows)));

const shapes = fc.tuple(fc.integer({ min: 1, max: 1100 }), fc.integer({ min: 1, max: 11 }), fc.nat(1e6));

test("the triangle has the bits of the plain elimination, whatever the shape", () => {
  fc.assert(
    fc.property(shapes, ([T, k, seed]) => {
      const columns = gaussian(T, k, seed);
      assert.deepEqual([...tallR(columns).data], [...tallRPlain(columns)]);
    }),
    { numRuns: 60, seed: 1 },
  );
});

test("an orthonormal basis has the bits of the plain one", () => {
  fc.assert(
    fc.property(shapes, ([T, k, seed]) => {
      fc.pre(T >= k);
      const columns = gaussian(T, k, seed);
      const plain = columns.map((column) => column.slice());
      for (let pass = 0; pass < 2; pass++) divideByTrianglePlain(plain, tallRPlain(plain));
      assert.deepEqual([...orthonormalBasis(fromColumns(columns)).data], [...fromColumns(plain).data]);
    }),
    { numRuns: 30, seed: 4 },
  );
});

test("moving sums have the bits of the plain ones, with and without a multiplier", () => {
  fc.assert(
    fc.property(shapes, fc.integer({ min: 1, max: 1500 }), ([T, k, seed], m) => {
      const columns = gaussian(T, k, seed);
      const u = counterRandom(seed, 99).fillNormal(new Float64Array(T));
      const wanted = movingSumProductsPlain(columns, u, m);
      assert.deepEqual([...movingSumProducts({ columns, multiplier: u }, m).data], [...wanted]);
      const scores = columns.map((column) => column.map((value, t) => value * u[t]!));
      assert.deepEqual([...movingSumProducts({ columns: scores }, m).data], [...wanted]);
    }),
    { numRuns: 40, seed: 2 },
  );
});

test("running sums that are formed anew on the way agree with those that are not to 12 digits", () => {
  const columns = gaussian(20_000, 3, 5).map((column) => column.map((value) => value + 3));
  const u = counterRandom(5, 99).fillNormal(new Float64Array(20_000));
  for (const m of [1, 40, 2000]) {
    agree(movingSumProducts({ columns, multiplier: u }, m).data, movingSumProductsPlain(columns, u, m), 12);
  }
});

test("lagged products have the bits of the plain ones", () => {
  fc.assert(
    fc.property(shapes, fc.integer({ min: 0, max: 60 }), ([T, k, seed], lags) => {
      const columns = gaussian(T, k, seed);
      const u = counterRandom(seed, 99).fillNormal(new Float64Array(T));
      const weights = Float64Array.from({ length: Math.min(lags, T - 1) + 1 }, (_, j) => 1 / (1 + j));
      assert.deepEqual(
        [...laggedProducts({ columns, multiplier: u }, weights).data],
        [...laggedProductsPlain(columns, u, weights, Math.min(1024, Math.ceil(T / 8) * 8))],
      );
    }),
    { numRuns: 30, seed: 3 },
  );
});

test("at the coefficients the gradient in doubled precision is below what their last bits move", () => {
  for (const [T, k] of [
    [50, 4],
    [3000, 7],
  ] as const) {
    const columns = gaussian(T, k, T);
    const y = counterRandom(T, 99).fillNormal(new Float64Array(T));
    const { coefficients, residuals, gramInverse } = solveLeastSquares(fromColumns(columns), y);
    const pairs = residualPairsPlain(columns, y, { high: coefficients, low: new Float64Array(k) });
    const gradient = gradientPlain(columns, pairs);
    // (X'X)⁻¹X'r is the distance to the exact minimiser: half a unit in the last place at most.
    for (let j = 0; j < k; j++) {
      let step = 0;
      for (let i = 0; i < k; i++) step += gramInverse.data[i * k + j]! * gradient[i]!;
      assert.ok(Math.abs(step) <= 2 ** -53 * Math.abs(coefficients[j]!) * 1.0001);
    }
    // The residuals belong to the unrounded coefficients: within the rounding of Xβ.
    for (let t = 0; t < T; t++) assert.ok(Math.abs(residuals[t]! - pairs.high[t]!) < 1e-14);
  }
});

test("columns far beyond the range of squares are solved as if they were of ordinary size", () => {
  const columns = gaussian(400, 3, 6);
  const y = counterRandom(6, 99).fillNormal(new Float64Array(400));
  const ordinary = solveLeastSquares(fromColumns(columns), y).coefficients;
  const scales = [2 ** 600, 2 ** -600, 1];
  const extreme = columns.map((column, j) => column.map((value) => value * scales[j]!));
  const { coefficients } = solveLeastSquares(fromColumns(extreme), y);
  assert.deepEqual(
    [...coefficients].map((value, j) => value * scales[j]!),
    [...ordinary],
  );
});

test("a second call gives the same bits, after a larger one has grown the memory", () => {
  const columns = gaussian(500, 5, 7);
  const before = [...tallR(columns).data];
  laggedProducts({ columns: gaussian(30_000, 8, 8) }, new Float64Array(20_000).fill(0.1).fill(0, 3));
  assert.deepEqual([...tallR(columns).data], before);
});
