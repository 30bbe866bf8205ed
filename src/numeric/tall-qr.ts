import { copyBlock } from "./copy-block.js";
import { InputError } from "./failure.js";
import { columnOf, type Matrix, matrix } from "./matrix.js";
import { norm, powerOfTwo } from "./scaling.js";
import { padded, workspace } from "./wasm.js";

/** Rows eliminated at once: with a dozen columns they fit the processor's first cache. */
const blockRows = 256;
/** Rows copied at once. */
const copiedRows = 4 * blockRows;

/**
 * Upper triangular R (m×m) of a QR decomposition of a tall matrix given by its columns, T rows: Householder
 * reflections over blocks of rows that fit the cache, each block stacked under the R of those before it.
 * Cost 2 T m². The diagonal may be of either sign.
 */
export function tallR(columns: readonly Float64Array[]): Matrix {
  const m = columns.length;
  const T = columns[0]!.length;
  // Columns a power of two apart would share the cache's few places for one address.
  const stride = padded(Math.min(T, copiedRows)) + 8;
  const { kernels, numbers, at } = workspace(m * m, m * stride, 8);
  const [triangle, block, work] = at as [number, number, number];
  for (let copied = 0; copied < T; copied += copiedRows) {
    const end = Math.min(copied + copiedRows, T);
    copyBlock(columns, copied, end - copied, numbers, block, stride);
    for (let start = copied; start < end; start += blockRows) {
      const rows = padded(Math.min(blockRows, end - start));
      const from = block + start - copied;
      kernels.eliminate(8 * triangle, 8 * from, 8 * stride, m, rows, 8 * work);
    }
  }
  const r = matrix(m, m);
  for (let j = 0; j < m; j++) {
    for (let i = 0; i <= j; i++) r.data[j * m + i] = numbers[triangle + j * m + i]!;
  }
  return r;
}

/** The triangle of columns brought to lengths in [1, 2) by powers of two, which cost no digit. */
export interface ScaledTriangle {
  /** The given columns; copies times `before` where their squares would have left the range of numbers. */
  readonly columns: readonly Float64Array[];
  readonly before: Float64Array;
  /** R of `columns` times `scales`. */
  readonly r: Matrix;
  readonly scales: Float64Array;
}

/** Lengths between these need no scaling before the elimination: no square of an entry that matters is lost. */
const safe = 1e100;

/**
 * R of the columns at lengths near one. A power of two commutes with every step of the elimination, so the columns are
 * scaled afterwards, and before it only where squares could leave the range of numbers. Throws InputError at an entry
 * that is not a finite number; `name` says what a column is called.
 */
export function scaledTriangle(
  given: readonly Float64Array[],
  name = (j: number) => `column ${j + 1}`,
): ScaledTriangle {
  let columns = given;
  let before = new Float64Array(given.length).fill(1);
  let r = tallR(columns);
  const inRange = (j: number) => {
    const length = norm(columnOf(r, j));
    return length > 1 / safe && length < safe;
  };
  if (!columns.every((_, j) => inRange(j))) {
    before = Float64Array.from(given, (column, j) => powerOfTwo(largest(column, name(j))));
    columns = given.map((column, j) => column.map((value) => value * before[j]!));
    r = tallR(columns);
  }
  const scales = Float64Array.from(columns, (_, j) => powerOfTwo(norm(columnOf(r, j))));
  for (let j = 0; j < r.columns; j++) {
    for (let i = 0; i <= j; i++) r.data[j * r.rows + i]! *= scales[j]!;
  }
  return { columns, before, r, scales };
}

/** The largest size in a column. */
function largest(column: Float64Array, name: string): number {
  let size = 0;
  for (let t = 0; t < column.length; t++) {
    const value = Math.abs(column[t]!);
    if (!Number.isFinite(value))
      throw new InputError(`Row ${t + 1} of ${name} is ${column[t]}; only finite numbers can be fitted.`);
    if (value > size) size = value;
  }
  return size;
}
