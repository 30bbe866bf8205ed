import { copyBlock } from "./copy-block.js";
import type { Matrix } from "./matrix.js";
import { norm, solveUpper, solveUpperTransposed } from "./scaling.js";
import { padded, workspace } from "./wasm.js";

const splitter = 134217729; // 2²⁷ + 1, Dekker (1971)
const mostSteps = 8;
const blockRows = 512;
/** The share of a coefficient that a further step may still change: one coefficient in 2¹⁷ is off by its last bit. */
const settled = 2 ** -70;

/** Coefficients as unevaluated sums of two numbers. */
interface Pairs {
  readonly high: Float64Array;
  readonly low: Float64Array;
}

/**
 * Refines least-squares coefficients: β ← β + R⁻¹R⁻ᵀ X'(y − Xβ), with the residuals and the gradient in doubled precision
 * (Dekker's products, Knuth's sums; Björck 1967), until a further step could not change their rounding. A step multiplies
 * the error by about κ·2⁻⁵³, so that for most designs one is enough, and is known to be by the condition number κ of the
 * scaled triangle. β is kept as pairs and rounded once. Each step goes through X once, in blocks.
 */
export function refine(
  columns: readonly Float64Array[],
  y: Float64Array,
  scaledR: Matrix,
  scales: Float64Array,
  start: Float64Array,
  condition: number,
): { coefficients: Float64Array; residuals: Float64Array } {
  const k = columns.length;
  const beta: Pairs = { high: Float64Array.from(start), low: new Float64Array(k) };
  const residuals = new Float64Array(y.length);
  const rest = new Float64Array(y.length);
  const contraction = 16 * condition * condition * 2 ** -53;
  let before = Number.POSITIVE_INFINITY;
  for (let step = 0; ; step++) {
    const gradient = residualsAndGradient(columns, y, beta, residuals, rest);
    for (let j = 0; j < k; j++) gradient[j]! *= scales[j]!;
    const change = solveUpper(scaledR, solveUpperTransposed(scaledR, gradient));
    const size = norm(change.map((value, j) => value / (Math.abs(beta.high[j]! / scales[j]!) || 1)));
    if (!(size < before)) break; // no longer converging: the last pairs stand
    before = size;
    const next = contraction * largestShare(change, beta.high, scales);
    for (let j = 0; j < k; j++) {
      change[j]! *= scales[j]!;
      addToPair(beta, j, change[j]!);
    }
    if (size < settled || next < settled || step === mostSteps) {
      correct(columns, change, residuals, rest);
      break;
    }
  }
  return { coefficients: beta.high.map((value, j) => value + beta.low[j]!), residuals };
}

/** The largest change over the smallest coefficient, both for columns at lengths near one. */
function largestShare(change: Float64Array, beta: Float64Array, scales: Float64Array): number {
  let largest = 0;
  let smallest = Number.POSITIVE_INFINITY;
  for (let j = 0; j < beta.length; j++) {
    largest = Math.max(largest, Math.abs(change[j]!));
    smallest = Math.min(smallest, Math.abs(beta[j]! / scales[j]!));
  }
  return largest / smallest;
}

function addToPair({ high, low }: Pairs, j: number, value: number): void {
  const a = high[j]!;
  const tail = low[j]! + value;
  const sum = a + tail;
  low[j] = tail - (sum - a);
  high[j] = sum;
}

/** Puts y − Xβ into `residuals` and what rounding leaves of it into `rest`. @returns X'(y − Xβ) */
function residualsAndGradient(
  columns: readonly Float64Array[],
  y: Float64Array,
  beta: Pairs,
  residuals: Float64Array,
  rest: Float64Array,
): Float64Array {
  const k = columns.length;
  const T = y.length;
  const stride = padded(Math.min(T, blockRows));
  const { kernels, numbers, at } = workspace(k * stride, stride, stride, stride, 4 * k, 8 * k);
  const [x, outcome, high, low, coefficients, sums] = at as [number, number, number, number, number, number];
  for (let j = 0; j < k; j++) {
    const value = -beta.high[j]!;
    const c = splitter * value;
    const upper = c - (c - value);
    numbers.set([value, upper, value - upper, -beta.low[j]!], coefficients + 4 * j);
  }
  const pointers = [8 * x, 8 * stride, k] as const;
  for (let start = 0; start < T; start += blockRows) {
    const rows = Math.min(blockRows, T - start);
    copyBlock(columns, start, rows, numbers, x, stride);
    copyBlock([y], start, rows, numbers, outcome, stride);
    kernels.residualPairs(...pointers, padded(rows), 8 * outcome, 8 * coefficients, 8 * high, 8 * low);
    kernels.gradient(...pointers, padded(rows), 8 * high, 8 * low, 8 * sums);
    residuals.set(numbers.subarray(high, high + rows), start);
    rest.set(numbers.subarray(low, low + rows), start);
  }
  return Float64Array.from({ length: k }, (_, j) => joined(numbers, sums + 8 * j).sum);
}

/** The four sums and tails of the gradient kernel as one number and what it lacks; the sums are added without loss. */
export function joined(numbers: Float64Array, at: number): { sum: number; tail: number } {
  let sum = 0;
  let tail = 0;
  for (const i of [0, 2, 1, 3]) {
    const value = numbers[at + i]!;
    const next = sum + value;
    const part = next - sum;
    tail += sum - (next - part) + (value - part) + numbers[at + 4 + i]!;
    sum = next;
  }
  const whole = sum + tail;
  return { sum: whole, tail: tail - (whole - sum) };
}

/** Takes Xδ off the residuals, a small change δ of the coefficients having been made. */
function correct(
  columns: readonly Float64Array[],
  change: Float64Array,
  residuals: Float64Array,
  rest: Float64Array,
): void {
  const k = columns.length;
  const T = residuals.length;
  const stride = padded(Math.min(T, blockRows));
  const { kernels, numbers, at } = workspace(k * stride, stride, stride, k);
  const [x, high, low, delta] = at as [number, number, number, number];
  numbers.set(change, delta);
  for (let start = 0; start < T; start += blockRows) {
    const rows = Math.min(blockRows, T - start);
    copyBlock(columns, start, rows, numbers, x, stride);
    copyBlock([residuals, rest], start, rows, numbers, high, stride);
    kernels.correctResiduals(8 * x, 8 * stride, k, padded(rows), 8 * delta, 8 * high, 8 * low);
    residuals.set(numbers.subarray(high, high + rows), start);
  }
}
