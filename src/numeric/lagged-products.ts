import { type Matrix, matrix } from "./matrix.js";
import { copySeries, type RowSeries } from "./series-block.js";
import { padded, workspace } from "./wasm.js";

const blockRows = 1024;

/**
 * Σ_j w_j Σ_t v_t v'_{t−j} over |j| ≤ L, k×k, for weights w_0..w_L: each column is filtered by ½w_0, w_1, ..., w_L and multiplied
 * with the columns once, so that a lag costs O(k) a row and not O(k²).
 */
export function laggedProducts(series: RowSeries, weights: Float64Array): Matrix {
  const k = series.columns.length;
  const n = series.columns[0]?.length ?? 0;
  const last = Math.min(weights.length, n) - 1;
  const result = matrix(k, k);
  if (n === 0) return result;
  const size = padded(Math.min(Math.max(blockRows, last), n), 8);
  const stride = padded(last + size);
  const space = workspace(k * stride, k * size, last + 1, k * k, stride, 4);
  const { kernels, numbers, at } = space;
  const [values, filtered, filter, sums, held, work] = at as [
    ...[number, number, number],
    ...[number, number, number],
  ];
  numbers.set(weights.subarray(0, last + 1), filter);
  numbers[filter] = weights[0]! / 2;
  const now = 8 * (values + last);
  for (let from = 0; from < n; from += size) {
    copySeries(series, from - last, from + size, space, values, stride, held);
    kernels.filter(now, 8 * stride, k, size, 8 * filter, last, 8 * filtered, 8 * size);
    kernels.addProducts(now, 8 * stride, 8 * filtered, 8 * size, k, size, false, 8 * sums, 8 * work);
  }
  for (let j = 0; j < k; j++) {
    for (let i = 0; i <= j; i++) {
      const sum = numbers[sums + j * k + i]! + numbers[sums + i * k + j]!;
      result.data[j * k + i] = result.data[i * k + j] = sum;
    }
  }
  return result;
}
