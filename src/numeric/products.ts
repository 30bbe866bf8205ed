import { columnOf, type Matrix, matrix } from "./matrix.js";

/** Inner product of two vectors of one length, summed from the first entry to the last. */
export function dot(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
}

/** A'. */
export function transpose(a: Matrix): Matrix {
  const result = matrix(a.columns, a.rows);
  for (let j = 0; j < a.columns; j++) {
    for (let i = 0; i < a.rows; i++) result.data[i * a.columns + j] = a.data[j * a.rows + i]!;
  }
  return result;
}

/** The n×n identity. */
export function identity(n: number): Matrix {
  const result = matrix(n, n);
  for (let i = 0; i < n; i++) result.data[i * n + i] = 1;
  return result;
}

/** A·B. */
export function multiply(a: Matrix, b: Matrix): Matrix {
  const result = matrix(a.rows, b.columns);
  for (let j = 0; j < b.columns; j++) {
    const target = columnOf(result, j);
    for (let l = 0; l < a.columns; l++) {
      const weight = b.data[j * b.rows + l]!;
      if (weight === 0) continue;
      const source = columnOf(a, l);
      for (let i = 0; i < a.rows; i++) target[i]! += weight * source[i]!;
    }
  }
  return result;
}

/** A'B; with one argument the Gram matrix A'A. */
export function crossproduct(a: Matrix, b: Matrix = a): Matrix {
  const result = matrix(a.columns, b.columns);
  for (let i = 0; i < a.columns; i++) {
    for (let j = a === b ? i : 0; j < b.columns; j++) {
      const value = dot(columnOf(a, i), columnOf(b, j));
      result.data[j * a.columns + i] = value;
      if (a === b) result.data[i * a.columns + j] = value;
    }
  }
  return result;
}

/** A·x for a vector x as long as A has columns. */
export function timesVector(a: Matrix, x: ArrayLike<number>): Float64Array {
  const result = new Float64Array(a.rows);
  for (let j = 0; j < a.columns; j++) {
    const column = columnOf(a, j);
    const weight = x[j]!;
    for (let i = 0; i < a.rows; i++) result[i]! += weight * column[i]!;
  }
  return result;
}

/** A'·x for a vector x as long as A has rows. */
export function transposeTimesVector(a: Matrix, x: ArrayLike<number>): Float64Array {
  return Float64Array.from({ length: a.columns }, (_, j) => dot(columnOf(a, j), x));
}

/** A S A' for a symmetric S with as many rows as A has columns, symmetric to the bit: A may be a bread or restrictions. */
export function symmetricProduct(a: Matrix, s: Matrix): Matrix {
  const result = multiply(multiply(a, s), transpose(a));
  for (let i = 0; i < a.rows; i++) {
    for (let j = 0; j < i; j++) {
      const mean = (result.data[i * a.rows + j]! + result.data[j * a.rows + i]!) / 2;
      result.data[i * a.rows + j] = mean;
      result.data[j * a.rows + i] = mean;
    }
  }
  return result;
}
