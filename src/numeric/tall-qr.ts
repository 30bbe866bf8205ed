import { columnOf, type Matrix, matrix } from "./matrix.js";
import { norm, powerOfTwo } from "./scaling.js";
import { padded, workspace } from "./wasm.js";

const blockRows = 256;

/**
 * Upper triangular R (m×m) of a QR decomposition of a tall matrix given by its columns, T rows: Householder
 * reflections over blocks of rows that fit the cache, each block stacked under the R of those before it.
 * Cost 2 T m². The diagonal may be of either sign.
 */
export function tallR(columns: readonly Float64Array[]): Matrix {
  const m = columns.length;
  const T = columns[0]!.length;
  const stride = padded(Math.min(T, blockRows));
  const {
    kernels,
    numbers,
    at: [triangle, block, work],
  } = workspace(m * m, m * stride, 8);
  for (let start = 0; start < T; start += blockRows) {
    const rows = Math.min(blockRows, T - start);
    for (let j = 0; j < m; j++) {
      const from = block! + j * stride;
      numbers.set(columns[j]!.subarray(start, start + rows), from);
      numbers.fill(0, from + rows, from + padded(rows));
    }
    kernels.eliminate(8 * triangle!, 8 * block!, 8 * stride, m, padded(rows), 8 * work!);
  }
  const r = matrix(m, m);
  for (let j = 0; j < m; j++) {
    for (let i = 0; i <= j; i++) r.data[j * m + i] = numbers[triangle! + j * m + i]!;
  }
  return r;
}

/** The triangle of columns that were multiplied by `scales`, powers of two which bring their lengths into [1, 2). */
export interface ScaledTriangle {
  readonly r: Matrix;
  readonly scales: Float64Array;
}

/** Lengths between these need no scaling before the elimination: no square of an entry that matters is lost. */
const safe = 1e100;

/**
 * R of the columns at lengths near one. A power of two commutes with every step of the elimination, so the columns are
 * scaled afterwards, and before it only where squares could leave the range of numbers.
 */
export function scaledTriangle(columns: readonly Float64Array[]): ScaledTriangle {
  const r = tallR(columns);
  const lengths = columns.map((_, j) => norm(columnOf(r, j)));
  if (!lengths.every((length) => length > 1 / safe && length < safe)) return scaledBefore(columns);
  const scales = Float64Array.from(lengths, powerOfTwo);
  for (let j = 0; j < r.columns; j++) {
    for (let i = 0; i <= j; i++) r.data[j * r.rows + i]! *= scales[j]!;
  }
  return { r, scales };
}

function scaledBefore(columns: readonly Float64Array[]): ScaledTriangle {
  const scales = Float64Array.from(columns, (column) => powerOfTwo(norm(column)));
  const r = tallR(columns.map((column, j) => column.map((value) => value * scales[j]!)));
  return { r, scales };
}
