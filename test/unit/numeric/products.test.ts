import assert from "node:assert/strict";
import { test } from "node:test";
import {
  crossproduct,
  fromColumns,
  identity,
  matrix,
  multiply,
  symmetricProduct,
  timesVector,
  transpose,
  transposeTimesVector,
} from "../../../src/numeric/index.js";

const A = fromColumns([
  [1, 4],
  [2, 5],
  [3, 6],
]); // 2×3: rows 1 2 3 and 4 5 6
const S = matrix(3, 3, Float64Array.of(2, 1, 0, 1, 3, -1, 0, -1, 4));

test("products of small whole matrices, exactly", () => {
  assert.deepEqual([...multiply(A, transpose(A)).data], [14, 32, 32, 77]);
  assert.deepEqual([...crossproduct(A).data], [17, 22, 27, 22, 29, 36, 27, 36, 45]);
  assert.deepEqual([...crossproduct(A, A).data], [...crossproduct(A).data]);
  assert.deepEqual([...timesVector(A, [1, 0, -1])], [-2, -2]);
  assert.deepEqual([...transposeTimesVector(A, [1, 1])], [5, 7, 9]);
  assert.deepEqual([...multiply(A, identity(3)).data], [...A.data]);
});

test("A S A' for an A that is not square", () => {
  assert.deepEqual([...symmetricProduct(A, S).data], [...multiply(multiply(A, S), transpose(A)).data]);
  const { rows, columns } = symmetricProduct(A, S);
  assert.deepEqual([rows, columns], [2, 2]);
});
