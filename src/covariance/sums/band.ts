import { type Matrix, matrix } from "../../numeric/index.js";
import { addTimes, dot } from "../shape/vectors.js";
import { copyRows, type Series } from "./series.js";

const BLOCK = 2048;

/**
 * Σ_j κ_j Σ_t v_t v'_{t−j} over |j| ≤ last for a few lags: each column is filtered by ½κ_0, κ_1, ..., κ_last and multiplied with
 * the columns once, so that a lag costs O(k) a period and not O(k²).
 */
export function bandSum(series: Series, weights: Float64Array): Matrix {
  const { rows: n, columns: k } = series.columns;
  const last = weights.length - 1;
  const result = matrix(k, k);
  const size = Math.min(BLOCK, n);
  const padded = Array.from({ length: k }, () => new Float64Array(size + last));
  const current = padded.map((column) => column.subarray(last));
  const filtered = new Float64Array(size);
  for (let from = 0; from < n; from += size) {
    for (let j = 0; j < k; j++) copyRows(series, j, from - last, from + size, padded[j]!, 0);
    for (let j = 0; j < k; j++) {
      filtered.fill(0);
      addTimes(filtered, weights[0]! / 2, current[j]!);
      for (let lag = 1; lag <= last; lag++) {
        addTimes(filtered, weights[lag]!, padded[j]!.subarray(last - lag, last - lag + size));
      }
      for (let i = 0; i < k; i++) result.data[j * k + i]! += dot(current[i]!, filtered);
    }
  }
  for (let j = 0; j < k; j++) {
    for (let i = 0; i <= j; i++) {
      const sum = result.data[j * k + i]! + result.data[i * k + j]!;
      result.data[j * k + i] = result.data[i * k + j] = sum;
    }
  }
  return result;
}
