import { type Matrix, matrix } from "../../numeric/index.js";

/** factor · A S A' for a symmetric S, symmetric to the last bit. */
export function congruence(A: Matrix, S: Matrix, factor = 1): Matrix {
  const n = A.rows;
  const m = S.rows;
  const half = matrix(n, m);
  for (let j = 0; j < m; j++) {
    for (let l = 0; l < m; l++) {
      const s = S.data[j * m + l]!;
      if (s !== 0) for (let i = 0; i < n; i++) half.data[j * n + i]! += A.data[l * n + i]! * s;
    }
  }
  const result = matrix(n, n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = 0;
      for (let l = 0; l < m; l++) sum += half.data[l * n + i]! * A.data[l * n + j]!;
      result.data[j * n + i] = result.data[i * n + j] = factor * sum;
    }
  }
  return result;
}
