import assert from "node:assert/strict";
import { test } from "node:test";
import { kernels } from "../../../../src/covariance/kernels.js";
import { higherMoments } from "../../../../src/covariance/laws/band-moments.js";
import { fisherLaw, normalLaw, studentLaw } from "../../../../src/covariance/laws/classical-laws.js";
import { criticalValue, quadraticTail } from "../../../../src/covariance/laws/craig.js";
import {
  type ContrastDesign,
  contrastDesign,
  hacForm,
  imagesOf,
} from "../../../../src/covariance/laws/design.js";
import {
  autocorrelations,
  correlationOperator,
  requireStationary,
} from "../../../../src/covariance/laws/error-process.js";
import { chiSquaredDraw } from "../../../../src/covariance/laws/gamma.js";
import { resolver } from "../../../../src/covariance/laws/krylov.js";
import { quadratic, schurFirst } from "../../../../src/covariance/laws/schur.js";
import { bundles } from "../../../../src/covariance/laws/spectrum.js";
import { lagOperator } from "../../../../src/covariance/laws/toeplitz.js";
import { tridiagonalEigenvalues } from "../../../../src/covariance/laws/tridiagonal.js";
import { tridiagonalise } from "../../../../src/covariance/laws/tridiagonalise.js";
import { unevenness } from "../../../../src/covariance/laws/unevenness.js";
import { scoresOf } from "../../../../src/covariance/scores.js";
import {
  counterRandom,
  matrix,
  studentT,
  symmetricEigen,
  symmetricEigenvalues,
} from "../../../../src/numeric/index.js";
import { autoregressive, invented, regressionOf, unit } from "../regression.js";

test("equal eigenvalues 1/ν give the t law: tails to 1e-9, far out too, and critical values", () => {
  for (const df of [1, 3, 10, 40]) {
    const spectrum = { leading: new Float64Array(df).fill(1 / df), rest: [] };
    const bundled = { leading: new Float64Array(), rest: [{ value: 1 / df, count: df }] };
    for (const c of [0.5, 2, 5, 20]) {
      const wanted = 2 * studentT.upper(c, df);
      assert.ok(Math.abs(quadraticTail(c, spectrum) / wanted - 1) < 1e-8, `ν = ${df}, c = ${c}`);
      assert.ok(Math.abs(quadraticTail(c, bundled) / wanted - 1) < 1e-8);
    }
    const critical = criticalValue((c) => quadraticTail(c, spectrum), 0.05);
    assert.ok(Math.abs(critical / studentT.upperQuantile(0.025, df) - 1) < 1e-8);
  }
});

/** All eigenvalues of M D K D M. */
function allEigenvalues({ weights, basis }: ContrastDesign, weight: (lag: number) => number): Float64Array {
  const n = weights.length;
  const A = matrix(n, n);
  const M = matrix(n, n);
  for (let s = 0; s < n; s++) {
    for (let t = 0; t < n; t++) {
      A.data[t * n + s] = weight(Math.abs(s - t)) * weights[s]! * weights[t]!;
      let m = s === t ? 1 : 0;
      for (let j = 0; j < basis.columns; j++) m -= basis.data[j * n + s]! * basis.data[j * n + t]!;
      M.data[t * n + s] = m;
    }
  }
  const product = (X: typeof A, Y: typeof A): typeof A => {
    const Z = matrix(n, n);
    for (let j = 0; j < n; j++) {
      for (let l = 0; l < n; l++) {
        const y = Y.data[j * n + l]!;
        for (let i = 0; i < n; i++) Z.data[j * n + i]! += X.data[l * n + i]! * y;
      }
    }
    return Z;
  };
  const Z = product(product(M, A), M);
  for (let j = 0; j < n; j++) for (let i = 0; i < j; i++) Z.data[j * n + i] = Z.data[i * n + j]!;
  return symmetricEigenvalues(Z);
}

test("power sums of a form are those of its eigenvalues, and the spectrum found is theirs", () => {
  const scores = scoresOf(invented(70, 4, 3));
  const design = contrastDesign(scores, unit(4, 2));
  for (const [kernel, bandwidth] of [
    [kernels.bartlett, 5],
    [kernels.bartlett, 5.5],
    [kernels.bartlett, 15],
    [kernels.bartlett, 17.25],
    [kernels.bartlett, 70],
    [kernels.parzen, 9.5],
  ] as const) {
    const eigenvalues = allEigenvalues(design, (j) => (j === 0 ? 1 : kernel.weight(j / bandwidth)));
    const power = (p: number): number => eigenvalues.reduce((sum, value) => sum + value ** p, 0);
    const form = hacForm(design, kernel, bandwidth);
    assert.ok(Math.abs(form.sums.first - power(1)) < 1e-12);
    assert.ok(Math.abs(form.sums.second - power(2)) < 1e-12);
    assert.ok(Math.abs(form.exact().third! / power(3) - 1) < 1e-10);
    assert.ok(Math.abs(form.exact().fourth! / power(4) - 1) < 1e-10);
    const all = resolver(form)(1e6, 1e-15);
    const found = Float64Array.from(all.leading).sort().reverse();
    for (let i = 0; i < 20; i++) assert.ok(Math.abs(found[i]! - eigenvalues[i]!) < 1e-12, `eigenvalue ${i}`);
  }
  const images = imagesOf(design, lagOperator(kernels.daniell, 5, 70), scores.basis.data);
  assert.equal(higherMoments(design, kernels.daniell, 5, images), undefined);
});

test("bundles keep the power sums given", () => {
  const values = [0.3, 0.2, 0.2, 0.05, 0.01];
  const power = (p: number): number => values.reduce((sum, value) => sum + value ** p, 0);
  const four = bundles({ first: power(1), second: power(2), third: power(3), fourth: power(4) });
  const sum = (list: typeof four, p: number): number =>
    list.reduce((total, { value, count }) => total + count * value ** p, 0);
  for (const p of [1, 2, 3, 4]) assert.ok(Math.abs(sum(four, p) - power(p)) < 1e-14);
  const two = bundles({ first: power(1), second: power(2) });
  for (const p of [1, 2]) assert.ok(Math.abs(sum(two, p) - power(p)) < 1e-14);
  assert.deepEqual(bundles({ first: 1, second: 0.1, third: 0.01, fourth: 0.001 }), [
    { value: 0.1, count: 10 },
  ]);
});

test("lag operators agree with the matrix, one vector and two at once", () => {
  for (const n of [6, 33, 90]) {
    const random = counterRandom(n, 1);
    const x = random.fillNormal(new Float64Array(2 * n));
    for (const kernel of Object.values(kernels)) {
      for (const bandwidth of [0.5, 2.3, 5, 8, 20.5, n]) {
        const K = lagOperator(kernel, bandwidth, n);
        const out = new Float64Array(2 * n + 3).fill(7);
        K(x, 0, out, 3, true);
        for (let s = 0; s < 2 * n; s += 5) {
          const from = s < n ? 0 : n;
          let wanted = 0;
          for (let t = 0; t < n; t++) {
            const lag = Math.abs(s - from - t);
            wanted += (lag === 0 ? 1 : kernel.weight(lag / bandwidth)) * x[from + t]!;
          }
          assert.ok(
            Math.abs(out[3 + s]! - wanted) < 1e-11,
            `${kernel.name}, S = ${bandwidth}, n = ${n}, row ${s}`,
          );
        }
      }
    }
  }
});

test("tridiagonal form keeps eigenvalues and first components of eigenvectors", () => {
  const n = 12;
  const random = counterRandom(8, 0);
  const A = matrix(n, n);
  for (let i = 0; i < n; i++)
    for (let j = 0; j <= i; j++) A.data[j * n + i] = A.data[i * n + j] = random.normal();
  const { values, vectors } = symmetricEigen(A);
  const { diagonal, side } = tridiagonalise(A.data.slice(), n);
  const first = new Float64Array(n);
  first[0] = 1;
  tridiagonalEigenvalues(diagonal, side, first);
  const order = Array.from(diagonal.keys()).sort((a, b) => diagonal[b]! - diagonal[a]!);
  order.forEach((at, i) => {
    assert.ok(Math.abs(diagonal[at]! - values[i]!) < 1e-13);
    assert.ok(Math.abs(Math.abs(first[at]!) - Math.abs(vectors.data[i * n]!)) < 1e-12);
  });
});

test("autocorrelations of ARMA errors: AR(1) by its closed form, MA(1), AR(2) by Yule–Walker", () => {
  const ar1 = autocorrelations({ label: "", ar: [0.7], ma: [] }, 6);
  ar1.forEach((value, j) => {
    assert.ok(Math.abs(value - 0.7 ** j) < 1e-14);
  });
  const ma1 = autocorrelations({ label: "", ar: [], ma: [0.5] }, 4);
  assert.ok(Math.abs(ma1[1]! - 0.5 / 1.25) < 1e-15);
  assert.equal(ma1[2], 0);
  const ar2 = autocorrelations({ label: "", ar: [1.1, -0.3], ma: [] }, 4);
  assert.ok(Math.abs(ar2[1]! - 1.1 / 1.3) < 1e-13);
  assert.ok(Math.abs(ar2[2]! - (1.1 * ar2[1]! - 0.3)) < 1e-13);
  const n = 20;
  const x = counterRandom(2, 0).fillNormal(new Float64Array(n));
  const fast = new Float64Array(n);
  correlationOperator({ label: "", ar: [-0.6], ma: [] }, n)(x, 0, fast, 0);
  for (let t = 0; t < n; t++) {
    let wanted = 0;
    for (let s = 0; s < n; s++) wanted += (-0.6) ** Math.abs(t - s) * x[s]!;
    assert.ok(Math.abs(fast[t]! - wanted) < 1e-13);
  }
  assert.throws(() => requireStationary([1.2]), /not stationary/);
  assert.throws(() => requireStationary([0.5, 0.5]), /not stationary/);
  requireStationary([1.1, -0.3]);
});

test("χ² draws: mean ν and variance 2ν within four standard errors, whole and not", () => {
  for (const df of [1, 2.5, 30]) {
    const random = counterRandom(9, Math.round(10 * df));
    const n = 40_000;
    let sum = 0;
    let square = 0;
    for (let i = 0; i < n; i++) {
      const x = chiSquaredDraw(random, df);
      sum += x;
      square += x * x;
    }
    const mean = sum / n;
    const variance = square / n - mean * mean;
    assert.ok(Math.abs(mean - df) < 4 * Math.sqrt((2 * df) / n), `ν = ${df}: mean ${mean}`);
    assert.ok(
      Math.abs(variance / (2 * df) - 1) < 4 * Math.sqrt((2 + 12 / df) / n),
      `ν = ${df}: variance ${variance}`,
    );
  }
});

test("small eliminations", () => {
  const S = Float64Array.from([4, 1, 0.5, 1, 3, 0.2, 0.5, 0.2, 2]);
  const determinant = 4 * (6 - 0.04) - 1 * (2 - 0.1) + 0.5 * (0.2 - 1.5);
  assert.ok(Math.abs(schurFirst(S.slice(), 3) - determinant / (6 - 0.04)) < 1e-14);
  assert.ok(
    Math.abs(quadratic(S.slice(), Float64Array.from([1, 0, 0]), 3) - (6 - 0.04) / determinant) < 1e-14,
  );
  assert.equal(
    quadratic(Float64Array.from([1, 1, 1, 1]), Float64Array.from([1, 0]), 2),
    Number.POSITIVE_INFINITY,
  );
});

test("unevenness: none for a constant, 0.19 for a trend, little for a stationary regressor", () => {
  const T = 1500;
  const trend = Float64Array.from({ length: T }, (_, t) => t);
  const m = regressionOf(
    [new Float64Array(T).fill(1), trend, autoregressive(T, 0.5, 2)],
    autoregressive(T, 0.5, 1),
  );
  const scores = scoresOf(m);
  const alone = scoresOf(regressionOf([new Float64Array(T).fill(1)], autoregressive(T, 0.5, 1)));
  assert.ok(unevenness(alone, unit(1, 0)) < 1e-12);
  const slope = unevenness(scores, unit(3, 1));
  assert.ok(slope > 0.15 && slope < 0.5, `${slope}`);
  assert.ok(unevenness(scores, unit(3, 2)) < 0.08);
});

test("laws by table: names, degrees of freedom, inverses of one another", () => {
  for (const law of [studentLaw(12), normalLaw()]) {
    assert.ok(Math.abs(law.twoSided(law.critical(0.9)) - 0.1) < 1e-9);
    assert.equal(law.twoSided(-1.5), law.twoSided(1.5));
    assert.ok(Number.isNaN(law.twoSided(Number.NaN)));
  }
  assert.equal(studentLaw(12).name, "t(12)");
  const joint = fisherLaw(2, 30);
  assert.equal(joint.name, "F(2, 30)");
  assert.deepEqual(joint.df, [2, 30]);
  assert.ok(Math.abs(joint.upper(2 * 3.3158) - 0.05) < 1e-4, "F(2, 30) at 95 %: 3.3158");
});
