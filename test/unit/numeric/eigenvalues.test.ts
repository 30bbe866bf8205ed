import assert from "node:assert/strict";
import { test } from "node:test";
import { counterRandom, matrix, symmetricEigenvalues } from "../../../src/numeric/index.js";

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
