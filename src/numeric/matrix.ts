/** A dense matrix, column-major: entry (i, j) is `data[j * rows + i]`. */
export interface Matrix {
  readonly rows: number;
  readonly columns: number;
  readonly data: Float64Array;
}

/** A matrix over `data` (not copied), or of zeros. */
export function matrix(
  rows: number,
  columns: number,
  data: Float64Array = new Float64Array(rows * columns),
): Matrix {
  return { rows, columns, data };
}

/** A matrix whose columns are copies of the given ones, all of one length. */
export function fromColumns(columns: readonly ArrayLike<number>[]): Matrix {
  const rows = columns[0]?.length ?? 0;
  const result = matrix(rows, columns.length);
  columns.forEach((column, j) => {
    result.data.set(column, j * rows);
  });
  return result;
}

/** Column `j` as a view: writing to it writes to the matrix. */
export function columnOf(a: Matrix, j: number): Float64Array {
  return a.data.subarray(j * a.rows, (j + 1) * a.rows);
}

/** Entry (i, j). */
export function entry(a: Matrix, i: number, j: number): number {
  return a.data[j * a.rows + i]!;
}
