import assert from "node:assert/strict";
import { test } from "node:test";
import {
  autocovariances,
  brentMinimum,
  brentRoot,
  cholesky,
  counterRandom,
  craigTail,
  crossproduct,
  durbinWatsonLower,
  fft,
  gaussLegendre,
  hessian,
  imhofUpper,
  leadingEigenvalues,
  matrix,
  minimise,
  multiply,
  NotPositiveDefinite,
  orthonormalBasis,
  projectOut,
  singularValues,
  solveCholesky,
  studentT,
  symmetricEigen,
  symmetricEigenvalues,
  timesVector,
  transpose,
} from "../../../src/numeric/index.js";
import { agree } from "../../support/digits.js";

const gaussian = (rows: number, columns: number, seed: number) =>
  matrix(rows, columns, counterRandom(seed, 0).fillNormal(new Float64Array(rows * columns)));

test("fft against its definition", () => {
  const n = 64;
  const x = gaussian(n, 1, 1).data;
  const re = Float64Array.from(x);
  const im = new Float64Array(n);
  fft(re, im);
  for (const j of [0, 1, 17, 40]) {
    let cos = 0;
    let sin = 0;
    for (let t = 0; t < n; t++) {
      cos += x[t]! * Math.cos((2 * Math.PI * j * t) / n);
      sin -= x[t]! * Math.sin((2 * Math.PI * j * t) / n);
    }
    assert.ok(Math.abs(re[j]! - cos) < 1e-12 && Math.abs(im[j]! - sin) < 1e-12);
  }
  assert.throws(() => fft(new Float64Array(6), new Float64Array(6)), /power of two/);
});

test("autocovariances by transform equal the direct sums", () => {
  const x = gaussian(3000, 1, 2).data;
  const many = autocovariances(x, 2500);
  const few = autocovariances(x, 3);
  agree(many.slice(0, 4), few, 12);
  let last = 0;
  for (let t = 2500; t < 3000; t++) last += x[t]! * x[t - 2500]!;
  assert.ok(Math.abs(many[2500]! - last) < 1e-10);
});

test("eigenvalues with and without vectors, and the leading ones by products alone", () => {
  const S = crossproduct(gaussian(80, 60, 3));
  const { values, vectors } = symmetricEigen(S);
  agree(symmetricEigenvalues(S), values, 10);
  agree(
    multiply(S, vectors).data.slice(0, 60),
    vectors.data.slice(0, 60).map((v) => v * values[0]!),
    8,
  );
  const leading = leadingEigenvalues((x, out) => out.set(timesVector(S, x)), 60, 40);
  agree(leading.slice(0, 5), values.slice(0, 5), 10);
  agree(singularValues(S).slice(0, 10), values.slice(0, 10), 10);
});

test("Cholesky solves, and names the pivot that fails", () => {
  const S = crossproduct(gaussian(30, 5, 4));
  const L = cholesky(S);
  agree(multiply(L, transpose(L)).data, S.data, 12);
  const B = gaussian(5, 2, 5);
  agree(multiply(S, solveCholesky(L, B)).data, B.data, 10);
  assert.throws(
    () => cholesky(matrix(2, 2, Float64Array.of(1, 2, 2, 1))),
    (error: unknown) => error instanceof NotPositiveDefinite && error.pivot === 1,
  );
});

test("quadrature, roots and minima", () => {
  const { nodes, weights } = gaussLegendre(20, 0, 2);
  agree([nodes.reduce((sum, x, i) => sum + weights[i]! * x ** 9, 0)], [102.4], 14);
  agree([brentRoot((x) => x ** 3 - 2, 0, 2)], [2 ** (1 / 3)], 12);
  assert.throws(() => brentRoot((x) => x * x + 1, -1, 1), /same sign/);
  agree([brentMinimum((x) => (x - 0.3) ** 2 + 1, -2, 2).x], [0.3], 7);
  const valley = (x: Float64Array) => 100 * (x[1]! - x[0]! ** 2) ** 2 + (1 - x[0]!) ** 2; // Rosenbrock (1960)
  const found = minimise(valley, [-1.2, 1]);
  agree(found.x, [1, 1], 5);
  agree(hessian(valley, [1, 1]).data, [802, -400, -400, 200], 5);
});

test("Craig's integral gives Student's t, Imhof's the χ² and F laws", () => {
  for (const nu of [3, 10, 41]) {
    const lambdas = new Float64Array(nu).fill(1 / nu);
    for (const c of [0.5, 2, 6, 20])
      agree([craigTail(c, lambdas)], [2 * studentT.upper(c, nu)], 9, `t(${nu}) at ${c}`);
  }
  agree([imhofUpper([1, 1], 3)], [Math.exp(-1.5)], 9); // χ²(2)
  agree([imhofUpper([1, 1, -2, -2])], [1 / 3], 9); // P(F(2,2) > 2)
});

test("the law of the Durbin–Watson ratio against Imhof on its eigenvalues, with and without a gap", () => {
  const T = 60;
  const X = gaussian(T, 3, 6);
  X.data.fill(1, 0, T);
  const Q = orthonormalBasis(X);
  const linked = new Uint8Array(T).fill(1);
  linked[25] = 0;
  for (const links of [undefined, linked]) {
    const A = matrix(T, T);
    for (let t = 1; t < T; t++) {
      if (links && !links[t]) continue;
      A.data[t * T + t]! += 1;
      A.data[(t - 1) * T + t - 1]! += 1;
      A.data[t * T + t - 1]! -= 1;
      A.data[(t - 1) * T + t]! -= 1;
    }
    for (const d of [1.2, 1.7, 2.1, 2.9]) {
      const D = matrix(T, T, Float64Array.from(A.data));
      for (let t = 0; t < T; t++) D.data[t * T + t]! -= d;
      const half = matrix(T, T);
      for (let t = 0; t < T; t++) half.data.set(projectOut(Q, D.data.slice(t * T, (t + 1) * T)), t * T);
      const turned = transpose(half);
      const MDM = matrix(T, T);
      for (let t = 0; t < T; t++) MDM.data.set(projectOut(Q, turned.data.slice(t * T, (t + 1) * T)), t * T);
      const eigenvalues = symmetricEigenvalues(MDM).map((value) => -value);
      const exact = imhofUpper(eigenvalues);
      assert.ok(Math.abs(durbinWatsonLower(d, Q, links) - exact) < 2e-9, `d = ${d}`);
    }
  }
});
