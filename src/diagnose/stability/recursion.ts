import type { Regression } from "../../estimate/index.js";
import { columnOf } from "../../numeric/index.js";

/** What a pass over the rows finds. */
export interface Recursion {
  /** Residual sum of squares of the first 1, 2, ... rows of the pass. */
  readonly rss: Float64Array;
  /** Recursive residuals (Brown, Durbin and Evans 1975), in the order of the pass. */
  readonly residuals: Float64Array;
  /** The row of each recursive residual. */
  readonly rows: Int32Array;
  /** Number of terms determined after each row of the pass. */
  readonly rank: Int32Array;
}

/** Called after each row with the triangle reached so far, columns scaled to unit length over the whole sample. */
export type Watch = (row: number, R: Float64Array, rhs: Float64Array, rss: number, rank: number) => void;

/**
 * Updates the triangle of a QR decomposition row by row with Givens rotations, over rows `from` to `to` (downwards when `to`
 * is smaller): what is left of a row after the rotations is its recursive residual, and its square what the residual sum
 * of squares grows by. A term that is still zero or still a combination of others takes no part until it varies; the row
 * that determines it has no recursive residual. O(k²) a row.
 */
export function recursion(
  m: Regression,
  target: Float64Array,
  from = 0,
  to = m.T - 1,
  watch?: Watch,
): Recursion {
  const { k } = m;
  const columns = scaledColumns(m);
  const step = to >= from ? 1 : -1;
  const n = Math.abs(to - from) + 1;
  const R = new Float64Array(k * k); // row-major
  const rhs = new Float64Array(k);
  const size = new Float64Array(k);
  const row = new Float64Array(k);
  const rss = new Float64Array(n);
  const ranks = new Int32Array(n);
  const residuals: number[] = [];
  const rows: number[] = [];
  let sum = 0;
  let rank = 0;
  for (let i = 0; i < n; i++) {
    const t = from + i * step;
    let z = target[t]!;
    for (let j = 0; j < k; j++) {
      row[j] = columns[j]![t]!;
      size[j]! += row[j]! * row[j]!;
    }
    let consumed = false;
    for (let j = 0; j < k; j++) {
      const below = row[j]!;
      const above = R[j * k + j]!;
      if (above === 0 && below * below <= 1e-18 * size[j]!) continue;
      if (below === 0) continue;
      if (above === 0) {
        consumed = true;
        rank++;
      }
      const length = Math.hypot(above, below);
      const c = above / length;
      const s = below / length;
      for (let h = j; h < k; h++) {
        const upper = R[j * k + h]!;
        R[j * k + h] = c * upper + s * row[h]!;
        row[h] = c * row[h]! - s * upper;
      }
      const upper = rhs[j]!;
      rhs[j] = c * upper + s * z;
      z = c * z - s * upper;
    }
    if (!consumed) {
      sum += z * z;
      residuals.push(z);
      rows.push(t);
    }
    rss[i] = sum;
    ranks[i] = rank;
    watch?.(t, R, rhs, sum, rank);
  }
  return { rss, residuals: Float64Array.from(residuals), rows: Int32Array.from(rows), rank: ranks };
}

const scaled = new WeakMap<Regression, Float64Array[]>();

/** The columns of the terms scaled to unit length. */
export function scaledColumns(m: Regression): Float64Array[] {
  let columns = scaled.get(m);
  if (!columns) {
    columns = Array.from({ length: m.k }, (_, j) => {
      const x = columnOf(m.X, j);
      const length = columnLength(x);
      return x.map((v) => v / length);
    });
    scaled.set(m, columns);
  }
  return columns;
}

/** Length of a column, without overflow. */
export function columnLength(x: Float64Array): number {
  let largest = 0;
  for (const v of x) largest = Math.max(largest, Math.abs(v));
  let sum = 0;
  for (const v of x) sum += (v / largest) ** 2;
  return largest * Math.sqrt(sum);
}
