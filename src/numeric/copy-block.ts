import { padded } from "./wasm.js";

/** Copies rows of each column to the kernels' memory, with zeros up to a whole number of fours. */
export function copyBlock(
  columns: readonly Float64Array[],
  start: number,
  rows: number,
  numbers: Float64Array,
  to: number,
  stride: number,
): void {
  for (let j = 0; j < columns.length; j++) {
    const at = to + j * stride;
    numbers.set(columns[j]!.subarray(start, start + rows), at);
    numbers.fill(0, at + rows, at + padded(rows));
  }
}
