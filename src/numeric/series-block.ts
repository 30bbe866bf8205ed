import { padded, type Workspace } from "./wasm.js";

/** A vector series: k columns of one length n, each row multiplied by `multiplier` at that row where there is one. */
export interface RowSeries {
  readonly columns: readonly Float64Array[];
  readonly multiplier?: Float64Array | undefined;
}

/** Rows from…to of one column to the kernels' memory at `at`; zeros outside the series. */
export function copyStretch(
  column: Float64Array,
  from: number,
  to: number,
  numbers: Float64Array,
  at: number,
): void {
  const start = Math.min(Math.max(from, 0), to);
  const end = Math.max(Math.min(to, column.length), start);
  if (start > from) numbers.fill(0, at, at + start - from);
  if (end > start) numbers.set(column.subarray(start, end), at + start - from);
  if (end < to) numbers.fill(0, at + end - from, at + to - from);
}

/** Rows from…to of the series, multiplied, to `at`, columns `stride` numbers apart; `held` has room for one column. */
export function copySeries(
  { columns, multiplier }: RowSeries,
  from: number,
  to: number,
  { kernels, numbers }: Workspace,
  at: number,
  stride: number,
  held: number,
): void {
  const end = from + padded(to - from);
  columns.forEach((column, j) => {
    copyStretch(column, from, end, numbers, at + j * stride);
  });
  if (!multiplier) return;
  copyStretch(multiplier, from, end, numbers, held);
  kernels.multiplyRows(8 * at, 8 * stride, columns.length, end - from, 8 * held);
}
