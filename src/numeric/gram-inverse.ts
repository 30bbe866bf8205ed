import { copyBlock } from "./copy-block.js";
import { type Matrix, matrix } from "./matrix.js";
import { joined } from "./refinement.js";
import { solveUpper, solveUpperTransposed } from "./scaling.js";
import { padded, workspace } from "./wasm.js";

const blockRows = 512;
const splitter = 134217729; // 2²⁷ + 1, Dekker (1971)
/** Below this condition number the triangle alone gives (X'X)⁻¹ to twelve digits. */
const wellConditioned = 1000;
const mostSteps = 6;

/**
 * (X'X)⁻¹, k×k, of the columns times `scales`, from their triangle R. Each of its digits that R loses, about as many as the
 * condition number has, is brought back by refinement with X'X in doubled precision: G ← G + R⁻¹R⁻ᵀ(I − X'X G), which multiplies
 * the error by about κ·2⁻⁵³ a step, down to κ²·2⁻¹⁰⁶, where X'X itself ends.
 */
export function gramInverse(
  columns: readonly Float64Array[],
  r: Matrix,
  scales: Float64Array,
  condition: number,
): Matrix {
  const k = r.columns;
  const result = matrix(k, k);
  const gram = condition > wellConditioned ? gramPairs(columns, scales) : undefined;
  const unit = new Float64Array(k);
  for (let j = 0; j < k; j++) {
    unit.fill(0);
    unit[j] = 1;
    const high = solveUpper(r, solveUpperTransposed(r, unit));
    if (gram) refineColumn(gram, r, j, high);
    result.data.set(high, j * k);
  }
  for (let j = 0; j < k; j++) {
    for (let i = 0; i < j; i++) {
      const mean = (result.data[j * k + i]! + result.data[i * k + j]!) / 2;
      result.data[j * k + i] = mean;
      result.data[i * k + j] = mean;
    }
  }
  return result;
}

interface PairMatrix {
  readonly high: Matrix;
  readonly low: Matrix;
}

/** X'X of the scaled columns as unevaluated sums of two numbers. */
function gramPairs(columns: readonly Float64Array[], scales: Float64Array): PairMatrix {
  const k = columns.length;
  const T = columns[0]!.length;
  const stride = padded(Math.min(T, blockRows));
  const { kernels, numbers, at } = workspace(k * stride, stride, 8 * k * k);
  const [x, zero, sums] = at as [number, number, number];
  for (let start = 0; start < T; start += blockRows) {
    const rows = Math.min(blockRows, T - start);
    copyBlock(columns, start, rows, numbers, x, stride);
    for (let j = 0; j < k; j++) {
      const column = 8 * (x + j * stride);
      kernels.gradient(8 * x, 8 * stride, j + 1, padded(rows), column, 8 * zero, 8 * (sums + 8 * k * j));
    }
  }
  const high = matrix(k, k);
  const low = matrix(k, k);
  for (let j = 0; j < k; j++) {
    for (let i = 0; i <= j; i++) {
      const { sum, tail } = joined(numbers, sums + 8 * (k * j + i));
      for (const to of [j * k + i, i * k + j]) {
        high.data[to] = sum * scales[i]! * scales[j]!;
        low.data[to] = tail * scales[i]! * scales[j]!;
      }
    }
  }
  return { high, low };
}

/** Refines column j of the inverse, given rounded in `high` and kept in pairs meanwhile. */
function refineColumn(gram: PairMatrix, r: Matrix, j: number, high: Float64Array): void {
  const k = high.length;
  const low = new Float64Array(k);
  let before = Number.POSITIVE_INFINITY;
  for (let step = 0; step < mostSteps; step++) {
    const rest = Float64Array.from({ length: k }, (_, i) => residual(gram, i, i === j ? 1 : 0, high, low));
    const change = solveUpper(r, solveUpperTransposed(r, rest));
    const size = change.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
    if (!(size < before)) break; // no longer converging
    before = size;
    for (let i = 0; i < k; i++) {
      const tail = low[i]! + change[i]!;
      const sum = high[i]! + tail;
      low[i] = tail - (sum - high[i]!);
      high[i] = sum;
    }
  }
}

/** goal − Σ_m gram_im g_m in doubled precision. */
function residual(
  { high: a, low: al }: PairMatrix,
  i: number,
  goal: number,
  g: Float64Array,
  gl: Float64Array,
): number {
  const k = g.length;
  let sum = goal;
  let tail = 0;
  for (let m = 0; m < k; m++) {
    const x = -a.data[m * k + i]!;
    const y = g[m]!;
    const product = x * y;
    const cx = splitter * x;
    const xh = cx - (cx - x);
    const cy = splitter * y;
    const yh = cy - (cy - y);
    const lost = (x - xh) * (y - yh) - (product - xh * yh - (x - xh) * yh - xh * (y - yh));
    const next = sum + product;
    const part = next - sum;
    tail += sum - (next - part) + (product - part) + lost + x * gl[m]! - al.data[m * k + i]! * y;
    sum = next;
  }
  return sum + tail;
}
