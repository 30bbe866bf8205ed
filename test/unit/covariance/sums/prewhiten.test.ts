import assert from "node:assert/strict";
import { test } from "node:test";
import { hac } from "../../../../src/covariance/index.js";
import { prewhiten } from "../../../../src/covariance/sums/prewhiten.js";
import { columnOf, counterRandom, matrix } from "../../../../src/numeric/index.js";
import { digits } from "../../../support/digits.js";
import { autoregressive, regressionOf, standardErrors } from "../regression.js";

const T = 120;
const ones = new Float64Array(T).fill(1);
const x = autoregressive(T, 0.7, 1);
const z = autoregressive(T, 0.4, 2);
const y = autoregressive(T, 0.6, 3).map((u, t) => u + 0.3 * x[t]! + 2);

test("prewhitened errors do not change with units and origins of the regressors (the bandwidth fixed)", () => {
  for (const bandwidth of [1.5, 4, 9]) {
    const estimator = hac({ kernel: "quadratic spectral", bandwidth, prewhiten: true });
    const one = standardErrors(estimator.on(regressionOf([ones, x, z], y)).matrix);
    const other = standardErrors(
      estimator.on(
        regressionOf(
          [ones, x.map((v) => 1e4 * v + 300), z.map((v) => v / 1e3 - 7)],
          y.map((v) => v - 50),
        ),
      ).matrix,
    );
    assert.ok(digits(other[1]! * 1e4, one[1]!) > 9);
    assert.ok(digits(other[2]! / 1e3, one[2]!) > 9);
  }
});

test("singular values are held at 0.97, and it is said", () => {
  const walk = autoregressive(T, 0.999, 8);
  const drifting = autoregressive(T, 0.999, 9);
  const m = regressionOf([ones, walk], drifting);
  const covariance = hac({ kernel: "quadratic spectral", prewhiten: true }).on(m);
  const largest = covariance.details["largest singular value"] as number;
  if (largest > 0.97) assert.ok(covariance.remarks.some(({ text }) => /held at 0.97/.test(text)));
  // A series that its own autoregression blows up: x_t = 1.2 x_{t−1}.
  const growing = matrix(
    30,
    1,
    Float64Array.from({ length: 30 }, (_, t) => 1.2 ** t),
  );
  const whitened = prewhiten({ columns: growing });
  assert.ok(Math.abs(whitened.largestSingularValue - 1.2) < 1e-12);
  assert.ok(whitened.bounded);
  const residual = columnOf(whitened.series.columns, 0);
  assert.ok(
    residual.every((value) => Math.abs(value) > 0),
    "with the bound the residuals are not zero",
  );
});

test("a score that never moves is left out, and the rest is as without it", () => {
  const random = counterRandom(4, 0);
  const series = matrix(50, 2);
  columnOf(series, 0).set(random.fillNormal(new Float64Array(50)));
  const whitened = prewhiten({ columns: series });
  assert.equal(whitened.rank, 1);
  const alone = prewhiten({ columns: matrix(50, 1, columnOf(series, 0).slice()) });
  const sum = matrix(1, 1, new Float64Array([3]));
  assert.ok(Math.abs(whitened.recolour(sum).data[0]! / alone.recolour(sum).data[0]! - 1) < 1e-12);
  assert.equal(whitened.recolour(sum).data[3], 0);
});

test("scores without memory: prewhitening hardly matters", () => {
  const m = regressionOf(
    [ones, counterRandom(5, 0).fillNormal(new Float64Array(T))],
    counterRandom(6, 0).fillNormal(new Float64Array(T)),
  );
  const plain = standardErrors(hac({ kernel: "parzen", bandwidth: 6 }).on(m).matrix);
  const whitened = standardErrors(hac({ kernel: "parzen", bandwidth: 6, prewhiten: true }).on(m).matrix);
  plain.forEach((se, a) => {
    assert.ok(Math.abs(whitened[a]! / se - 1) < 0.15);
  });
});
