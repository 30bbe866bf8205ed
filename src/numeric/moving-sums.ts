import { type Matrix, matrix } from "./matrix.js";
import { copySeries, type RowSeries } from "./series-block.js";
import { padded, workspace } from "./wasm.js";

const blockRows = 512;

/**
 * Σ_j (1 − |j|/m)⁺ Σ_t v_t v'_{t−j} for a whole bandwidth m ≥ 1, k×k, in one pass whatever m is: it equals m⁻¹ Σ_s W_s W_s'
 * with W_s the n + m − 1 sums of m neighbouring v_t, zeros beyond both ends (Parzen 1963; checked against the lag sum
 * to 5e-15 at n = 10⁶). The running sums are formed anew every max(4096, 4m) steps, which keeps their drift below 1e-13.
 */
export function movingSumProducts(series: RowSeries, m: number): Matrix {
  const k = series.columns.length;
  const n = series.columns[0]?.length ?? 0;
  const result = matrix(k, k);
  if (n === 0) return result;
  const total = n + m - 1;
  const stride = padded(Math.min(blockRows, total));
  const space = workspace(k * stride, k * stride, stride, k, k * k, 4);
  const { kernels, numbers, at } = space;
  const [entering, leaving, held, running, sums, work] = at as [
    ...[number, number, number],
    ...[number, number, number],
  ];
  const renewal = Math.max(4096, 4 * m);
  let sinceRenewal = 0;
  for (let from = 0; from < total; from += blockRows) {
    const to = Math.min(total, from + blockRows);
    const rows = padded(to - from);
    const renew = sinceRenewal >= renewal;
    sinceRenewal = renew ? blockRows : sinceRenewal + blockRows;
    copySeries(series, from, to, space, entering, stride, held);
    copySeries(series, from - m, to - m, space, leaving, stride, held);
    if (renew) for (let j = 0; j < k; j++) numbers[running + j] = windowSum(series, j, from - m, from);
    kernels.movingSums(8 * entering, 8 * leaving, 8 * stride, k, rows, 8 * running);
    // Windows past the last one hold nothing but rounding.
    for (let j = 0; j < k; j++)
      numbers.fill(0, entering + j * stride + to - from, entering + j * stride + rows);
    kernels.addProducts(
      8 * entering,
      8 * stride,
      8 * entering,
      8 * stride,
      k,
      rows,
      true,
      8 * sums,
      8 * work,
    );
  }
  for (let j = 0; j < k; j++) {
    for (let i = 0; i <= j; i++) {
      result.data[j * k + i] = result.data[i * k + j] = numbers[sums + j * k + i]! / m;
    }
  }
  return result;
}

/** Σ of rows from…to of one column. */
function windowSum({ columns, multiplier }: RowSeries, column: number, from: number, to: number): number {
  const values = columns[column]!;
  const end = Math.min(to, values.length);
  let sum = 0;
  if (multiplier) for (let t = Math.max(from, 0); t < end; t++) sum += values[t]! * multiplier[t]!;
  else for (let t = Math.max(from, 0); t < end; t++) sum += values[t]!;
  return sum;
}
