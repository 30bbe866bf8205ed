import { fft } from "../../numeric/index.js";
import { type Kernel, lagWeights, lastLag } from "../kernels.js";

/** Writes K x to `out`; K is symmetric, and `out` must not be `x`. */
export type Apply = (x: Float64Array, out: Float64Array) => void;

/**
 * x → K x for K_st = κ((s − t)/S) over n periods, by the cheapest exact road: running sums for Bartlett, a band
 * for few lags, the Fourier transform for many.
 */
export function lagOperator(kernel: Kernel, bandwidth: number, n: number): Apply {
  const last = lastLag(kernel, bandwidth, n);
  if (last === 0) return (x, out) => out.set(x);
  if (last > 4 && kernel.name === "bartlett") return bartlettOperator(bandwidth, n);
  return toeplitzOperator(lagWeights(kernel, bandwidth, last), n);
}

/** x → K x for a symmetric Toeplitz K with the given first row (entries beyond its length are zero). */
export function toeplitzOperator(row: Float64Array, n: number): Apply {
  const last = row.length - 1;
  const size = 2 ** Math.ceil(Math.log2(n + last));
  return last < 12 * Math.log2(size) && last < n ? bandOperator(row, n) : fourierOperator(row, n, size);
}

function bandOperator(row: Float64Array, n: number): Apply {
  const last = row.length - 1;
  const padded = new Float64Array(n + 2 * last);
  return (x, out) => {
    padded.set(x, last);
    const w0 = row[0]!;
    for (let t = 0; t < n; t++) out[t] = w0 * x[t]!;
    for (let j = 1; j <= last; j++) {
      const w = row[j]!;
      const before = last - j;
      const after = last + j;
      for (let t = 0; t < n; t++) out[t]! += w * (padded[t + before]! + padded[t + after]!);
    }
  };
}

function fourierOperator(row: Float64Array, n: number, size: number): Apply {
  const spectrum = new Float64Array(size);
  spectrum.set(row);
  for (let j = 1; j < row.length; j++) spectrum[size - j] = row[j]!;
  const re = new Float64Array(size);
  const im = new Float64Array(size);
  fft(spectrum, im);
  for (let f = 0; f < size; f++) spectrum[f]! /= size;
  return (x, out) => {
    re.fill(0);
    im.fill(0);
    re.set(x);
    fft(re, im);
    for (let f = 0; f < size; f++) {
      re[f]! *= spectrum[f]!;
      im[f]! *= spectrum[f]!;
    }
    // The inverse transform is the forward one with real and imaginary parts exchanged.
    fft(im, re);
    for (let t = 0; t < n; t++) out[t] = re[t]!;
  };
}

/**
 * Bartlett weights of whole bandwidth m are m⁻¹ times the autocorrelation of a box of length m, so K x is two
 * moving sums. A bandwidth between m and m + 1 is the mean of both with weights that match it at lag m.
 */
function bartlettOperator(bandwidth: number, n: number): Apply {
  const whole = Math.floor(bandwidth);
  const above = (whole + 1) * (1 - whole / bandwidth);
  const sums = new Float64Array(n + whole);
  return (x, out) => {
    box(x, n, whole, sums, out, (1 - above) / whole, false);
    if (above > 0) box(x, n, whole + 1, sums, out, above / (whole + 1), true);
  };
}

function box(
  x: Float64Array,
  n: number,
  length: number,
  sums: Float64Array,
  out: Float64Array,
  factor: number,
  add: boolean,
): void {
  let running = 0;
  const total = n + length - 1;
  for (let s = 0; s < total; s++) {
    if (s < n) running += x[s]!;
    if (s >= length) running -= x[s - length]!;
    sums[s] = running;
  }
  running = 0;
  for (let s = 0; s < length - 1; s++) running += sums[s]!;
  for (let t = 0; t < n; t++) {
    running += sums[t + length - 1]!;
    out[t] = add ? out[t]! + factor * running : factor * running;
    running -= sums[t]!;
  }
}
