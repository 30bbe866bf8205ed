import assert from "node:assert/strict";
import { test } from "node:test";
import fc from "fast-check";
import {
  counterRandom,
  crossproduct,
  fromColumns,
  identity,
  multiply,
  orthonormalBasis,
  RankDeficient,
  solveLeastSquares,
} from "../../../src/numeric/index.js";
import { agree } from "../../support/digits.js";

const gaussian = (rows: number, columns: number, seed: number) =>
  Array.from({ length: columns }, (_, j) => counterRandom(seed, j).fillNormal(new Float64Array(rows)));

test("the gradient X'r vanishes and the pieces fit together", () => {
  const columns = gaussian(1000, 6, 1);
  const X = fromColumns(columns);
  const y = counterRandom(1, 99).fillNormal(new Float64Array(1000));
  const { residuals, gramInverse, R, rss } = solveLeastSquares(X, y);
  for (const column of columns) {
    const inner = column.reduce((sum, value, t) => sum + value * residuals[t]!, 0);
    assert.ok(Math.abs(inner) < 1e-11);
  }
  agree(
    multiply(crossproduct(X), gramInverse).data.map((value, i) => value + (i % 7 === 0 ? 0 : 1)),
    identity(6).data.map((value, i) => value + (i % 7 === 0 ? 0 : 1)),
    12,
  );
  agree(crossproduct(R).data, crossproduct(X).data, 12);
  agree([rss], [residuals.reduce((sum, value) => sum + value * value, 0)], 15);
});

test("nine powers of an integer, scaled condition above 1e5, are recovered to the last bits", () => {
  const x = Float64Array.from({ length: 30 }, (_, i) => i + 1);
  const X = fromColumns([0, 1, 2, 3, 4, 5, 6, 7, 8].map((power) => x.map((value) => value ** power)));
  // Whole coefficients and whole powers below 2⁵³ make y exact in doubles.
  const y = x.map((value) => 3 - 2 * value + value ** 2 + value ** 7);
  const { coefficients, condition } = solveLeastSquares(X, y);
  assert.ok(condition > 1e5);
  agree(coefficients, [3, -2, 1, 0, 0, 0, 0, 1, 0], 15);
});

test("the same bits whatever the order of the columns", () => {
  const columns = gaussian(300, 4, 2).map((column, j) => column.map((value) => value + 1e3 * j));
  const y = counterRandom(2, 99).fillNormal(new Float64Array(300));
  const straight = solveLeastSquares(fromColumns(columns), y).coefficients;
  const reversed = solveLeastSquares(fromColumns([...columns].reverse()), y).coefficients;
  assert.deepEqual([...straight], [...reversed].reverse());
});

test("scaling a column by any factor scales its coefficient", () => {
  const columns = gaussian(120, 3, 3);
  const y = counterRandom(3, 99).fillNormal(new Float64Array(120));
  const { coefficients } = solveLeastSquares(fromColumns(columns), y);
  fc.assert(
    fc.property(fc.double({ min: 1e-12, max: 1e12, noNaN: true }), (factor) => {
      const scaled = solveLeastSquares(
        fromColumns([columns[0]!, columns[1]!.map((v) => v * factor), columns[2]!]),
        y,
      );
      agree([scaled.coefficients[1]! * factor], [coefficients[1]!], 12);
    }),
    { numRuns: 60, seed: 11 },
  );
});

test("dependent columns are named, with the combination that reproduces the later one", () => {
  const [a, b] = gaussian(50, 2, 4) as [Float64Array, Float64Array];
  const sum = a.map((value, t) => 2 * value - 0.5 * b[t]!);
  const one = new Float64Array(50).fill(1);
  assert.throws(
    () => solveLeastSquares(fromColumns([one, a, b, sum]), a),
    (error: unknown) => {
      assert.ok(error instanceof RankDeficient);
      const [target] = error.dependent;
      const weights = new Map(error.combination[0]!.map(({ column, weight }) => [column, weight]));
      const columns = [one, a, b, sum];
      const rebuilt = one.map((_, t) =>
        [...weights].reduce((total, [column, weight]) => total + weight * columns[column]![t]!, 0),
      );
      agree(rebuilt, columns[target!]!, 9);
      assert.equal(weights.has(0), false);
      return true;
    },
  );
});

test("an orthonormal basis is one, also for nearly dependent columns", () => {
  const [a, b] = gaussian(400, 2, 5) as [Float64Array, Float64Array];
  const close = a.map((value, t) => value + 1e-9 * b[t]!);
  const Q = orthonormalBasis(fromColumns([a, close, new Float64Array(400).fill(7)]));
  const gram = crossproduct(Q).data;
  for (let i = 0; i < 9; i++) assert.ok(Math.abs(gram[i]! - (i % 4 === 0 ? 1 : 0)) < 1e-13);
});

test("sizes at either end of the range of numbers: coefficients and residuals as at ordinary size", () => {
  const columns = gaussian(50, 2, 6);
  const y = counterRandom(6, 99).fillNormal(new Float64Array(50));
  const ordinary = solveLeastSquares(fromColumns(columns), y);
  for (const [a, b] of [
    [1000, 1000],
    [1017, 0],
    [-1000, 0],
    [0, 1015],
    [0, -900],
    [-700, 300],
  ] as const) {
    const [first, second] = columns as [Float64Array, Float64Array];
    const X = fromColumns([first.map((value) => value * 2 ** a), second]);
    const found = solveLeastSquares(
      X,
      y.map((value) => value * 2 ** b),
    );
    agree(
      [found.coefficients[0]! * 2 ** (a / 2) * 2 ** (a / 2 - b), found.coefficients[1]! * 2 ** -b],
      ordinary.coefficients,
      15,
      `2^${a}, 2^${b}`,
    );
    agree(
      found.residuals.map((value) => value * 2 ** -b),
      ordinary.residuals,
      12,
      `residuals at 2^${a}, 2^${b}`,
    );
  }
});

test("a value that is no finite number is named by row and column", () => {
  const [a, b] = gaussian(20, 2, 7) as [Float64Array, Float64Array];
  const spoilt = a.map((value, t) => (t === 4 ? Number.NaN : value));
  assert.throws(() => solveLeastSquares(fromColumns([b, spoilt]), a), /Row 5 of column 2 is NaN/);
  assert.throws(() => solveLeastSquares(fromColumns([b]), spoilt), /Row 5 of the outcome is NaN/);
  assert.throws(() => orthonormalBasis(fromColumns([spoilt])), /Row 5 of column 1 is NaN/);
  assert.throws(() => solveLeastSquares(fromColumns([]), new Float64Array(0)), /no column/);
  assert.throws(() => solveLeastSquares(fromColumns([a]), b.subarray(1)), /20 rows of terms, 19/);
});
