import type { Matrix } from "./matrix.js";

/** Euclidean length of a vector, safe from overflow and underflow. */
export function norm(x: ArrayLike<number>): number {
  let largest = 0;
  for (let i = 0; i < x.length; i++) largest = Math.max(largest, Math.abs(x[i]!));
  if (largest === 0 || !Number.isFinite(largest)) return largest;
  let sum = 0;
  for (let i = 0; i < x.length; i++) {
    const part = x[i]! / largest;
    sum += part * part;
  }
  return largest * Math.sqrt(sum);
}

/**
 * The power of two that brings `size` into [1, 2), or as near as one in the range of numbers can: multiplying by it loses no
 * digit. One for zero.
 */
export function powerOfTwo(size: number): number {
  return size > 0 && Number.isFinite(size) ? 2 ** Math.min(1023, -Math.floor(Math.log2(size))) : 1;
}

/** Solves R'z = b for an upper triangular R (leading n×n part). */
export function solveUpperTransposed(r: Matrix, b: ArrayLike<number>, n = r.columns): Float64Array {
  const z = new Float64Array(n);
  for (let j = 0; j < n; j++) {
    let value = b[j]!;
    for (let i = 0; i < j; i++) value -= r.data[j * r.rows + i]! * z[i]!;
    z[j] = value / r.data[j * r.rows + j]!;
  }
  return z;
}

/** Solves Rz = b for an upper triangular R (leading n×n part). */
export function solveUpper(r: Matrix, b: ArrayLike<number>, n = r.columns): Float64Array {
  const z = Float64Array.from({ length: n }, (_, i) => b[i]!);
  for (let j = n - 1; j >= 0; j--) {
    z[j] = z[j]! / r.data[j * r.rows + j]!;
    for (let i = 0; i < j; i++) z[i]! -= r.data[j * r.rows + i]! * z[j]!;
  }
  return z;
}
