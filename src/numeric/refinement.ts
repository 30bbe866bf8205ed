import type { Matrix } from "./matrix.js";
import { norm, solveUpper, solveUpperTransposed } from "./scaling.js";

const splitter = 134217729; // 2²⁷ + 1, Dekker (1971)
const mostSteps = 6;

/**
 * Refines least-squares coefficients: the augmented system r + Xβ = y, X'r = 0 is solved again for its residuals,
 * which are formed in doubled precision (Dekker's products, Knuth's sums), until β no longer moves. The correction
 * uses Q = X R⁻¹ row by row, so no T×k matrix is stored. β is kept as a pair and rounded once.
 */
export function refine(
  columns: readonly Float64Array[],
  y: Float64Array,
  scaledR: Matrix,
  scales: Float64Array,
  start: Float64Array,
): { coefficients: Float64Array; residuals: Float64Array } {
  const k = columns.length;
  const T = y.length;
  const high = Float64Array.from(start);
  const low = new Float64Array(k);
  const residuals = new Float64Array(T);
  fill(residuals, columns, y, high, low);
  const misfit = new Float64Array(T);
  let before = Number.POSITIVE_INFINITY;
  for (let step = 0; step < mostSteps; step++) {
    // f = y − r − Xβ and X'r, both in doubled precision.
    for (let t = 0; t < T; t++) misfit[t] = rowResidual(columns, y[t]!, residuals[t]!, high, low, t);
    const gradient = Float64Array.from(columns, (column, j) => scales[j]! * exactDot(column, residuals));
    const projected = projectOnQ(columns, misfit, scaledR, scales);
    const pull = solveUpperTransposed(scaledR, gradient);
    const right = projected.map((value, j) => value + pull[j]!);
    const change = solveUpper(scaledR, right);
    const size = norm(change.map((value, j) => value / (Math.abs(high[j]! / scales[j]!) || 1)));
    if (!(size < before)) break; // no longer converging: the last pair stands
    before = size;
    for (let j = 0; j < k; j++) {
      change[j]! *= scales[j]!;
      addToPair(high, low, j, change[j]!);
    }
    for (let t = 0; t < T; t++) {
      let value = misfit[t]!;
      for (let j = 0; j < k; j++) value -= columns[j]![t]! * change[j]!;
      residuals[t]! += value;
    }
    if (size < 1e-18) break;
  }
  const coefficients = high.map((value, j) => value + low[j]!);
  fill(residuals, columns, y, high, low);
  return { coefficients, residuals };
}

function fill(
  residuals: Float64Array,
  columns: readonly Float64Array[],
  y: Float64Array,
  high: Float64Array,
  low: Float64Array,
): void {
  for (let t = 0; t < y.length; t++) residuals[t] = rowResidual(columns, y[t]!, 0, high, low, t);
}

function addToPair(high: Float64Array, low: Float64Array, j: number, value: number): void {
  const a = high[j]!;
  const tail = low[j]! + value;
  const sum = a + tail;
  low[j] = tail - (sum - a);
  high[j] = sum;
}

/** y_t − r_t − Σ x_tj (high_j + low_j), accumulated as a pair. */
function rowResidual(
  columns: readonly Float64Array[],
  y: number,
  r: number,
  high: Float64Array,
  low: Float64Array,
  t: number,
): number {
  let sum = y - r;
  let part = sum - y;
  let tail = y - (sum - part) - (r + part);
  for (let j = 0; j < columns.length; j++) {
    const a = columns[j]![t]!;
    const b = -high[j]!;
    const product = a * b;
    let c = splitter * a;
    const ah = c - (c - a);
    const al = a - ah;
    c = splitter * b;
    const bh = c - (c - b);
    const bl = b - bh;
    const error = al * bl - (product - ah * bh - al * bh - ah * bl);
    const next = sum + product;
    part = next - sum;
    tail += sum - (next - part) + (product - part) + error - a * low[j]!;
    sum = next;
  }
  return sum + tail;
}

/** x'r accumulated as a pair. */
function exactDot(x: Float64Array, r: Float64Array): number {
  let sum = 0;
  let tail = 0;
  for (let t = 0; t < x.length; t++) {
    const a = x[t]!;
    const b = r[t]!;
    const product = a * b;
    let c = splitter * a;
    const ah = c - (c - a);
    const al = a - ah;
    c = splitter * b;
    const bh = c - (c - b);
    const bl = b - bh;
    const error = al * bl - (product - ah * bh - al * bh - ah * bl);
    const next = sum + product;
    const part = next - sum;
    tail += sum - (next - part) + (product - part) + error;
    sum = next;
  }
  return sum + tail;
}

/** Q'f with the rows of Q = X R⁻¹ solved on the way. */
function projectOnQ(
  columns: readonly Float64Array[],
  f: Float64Array,
  r: Matrix,
  scales: Float64Array,
): Float64Array {
  const k = columns.length;
  const row = new Float64Array(k);
  const result = new Float64Array(k);
  for (let t = 0; t < f.length; t++) {
    const weight = f[t]!;
    if (weight === 0) continue;
    for (let j = 0; j < k; j++) {
      let value = columns[j]![t]! * scales[j]!;
      for (let i = 0; i < j; i++) value -= r.data[j * k + i]! * row[i]!;
      row[j] = value / r.data[j * k + j]!;
      result[j]! += row[j]! * weight;
    }
  }
  return result;
}
