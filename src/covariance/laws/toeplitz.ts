import { fft } from "../../numeric/index.js";
import { type Kernel, lagWeights, lastLag } from "../kernels.js";

/**
 * Takes a symmetric Toeplitz matrix K to vectors: writes K x to `out` from `outFrom` on for the x that starts at `from`.
 * With `two` the vector right behind x, n further on, is taken along at little or no cost, and its image lands n behind
 * the first. x and out must not overlap.
 */
export type LagOperator = (
  x: Float64Array,
  from: number,
  out: Float64Array,
  outFrom: number,
  two?: boolean,
) => void;

/**
 * K for K_st = κ((s − t)/S) over n periods, by the cheapest exact road: running sums for Bartlett, a band for few lags,
 * the Fourier transform for many.
 */
export function lagOperator(kernel: Kernel, bandwidth: number, n: number): LagOperator {
  const last = lastLag(kernel, bandwidth, n);
  if (last > 4 && kernel.name === "bartlett") return bartlettOperator(bandwidth, n);
  return toeplitzOperator(lagWeights(kernel, bandwidth, last), n);
}

/** K with the given first row; entries beyond its length are zero. */
export function toeplitzOperator(row: Float64Array, n: number): LagOperator {
  const last = row.length - 1;
  const size = 2 ** Math.ceil(Math.log2(n + last));
  return last < 12 * Math.log2(size) && last < n ? bandOperator(row, n) : fourierOperator(row, n, size);
}

/** An operator for two vectors from one for one. */
function oneByOne(
  n: number,
  apply: (x: Float64Array, from: number, out: Float64Array, outFrom: number) => void,
): LagOperator {
  return (x, from, out, outFrom, two) => {
    apply(x, from, out, outFrom);
    if (two) apply(x, from + n, out, outFrom + n);
  };
}

function bandOperator(row: Float64Array, n: number): LagOperator {
  const last = row.length - 1;
  const padded = new Float64Array(n + 2 * last);
  return oneByOne(n, (x, from, out, outFrom) => {
    for (let t = 0; t < n; t++) padded[last + t] = x[from + t]!;
    for (let t = 0; t < n; t++) {
      let sum = row[0]! * padded[last + t]!;
      for (let j = 1; j <= last; j++) sum += row[j]! * (padded[last + t - j]! + padded[last + t + j]!);
      out[outFrom + t] = sum;
    }
  });
}

function fourierOperator(row: Float64Array, n: number, size: number): LagOperator {
  const spectrum = new Float64Array(size);
  spectrum.set(row);
  for (let j = 1; j < row.length; j++) spectrum[size - j] = row[j]!;
  const re = new Float64Array(size);
  const im = new Float64Array(size);
  fft(spectrum, im);
  for (let f = 0; f < size; f++) spectrum[f]! /= size;
  // Real weights keep real and imaginary parts apart, so that two vectors share a transform.
  return (x, from, out, outFrom, two) => {
    re.fill(0, n);
    im.fill(0, two ? n : 0);
    for (let t = 0; t < n; t++) re[t] = x[from + t]!;
    if (two) for (let t = 0; t < n; t++) im[t] = x[from + n + t]!;
    fft(re, im);
    for (let f = 0; f < size; f++) {
      re[f]! *= spectrum[f]!;
      im[f]! *= spectrum[f]!;
    }
    // The inverse transform is the forward one with real and imaginary parts exchanged.
    fft(im, re);
    for (let t = 0; t < n; t++) out[outFrom + t] = re[t]!;
    if (two) for (let t = 0; t < n; t++) out[outFrom + n + t] = im[t]!;
  };
}

/**
 * Bartlett weights of whole bandwidth m are m⁻¹ times the autocorrelation of a box of length m, so K x is two
 * moving sums. A bandwidth between m and m + 1 is the mean of both with weights that match it at lag m.
 */
function bartlettOperator(bandwidth: number, n: number): LagOperator {
  const whole = Math.floor(bandwidth);
  const above = (whole + 1) * (1 - whole / bandwidth);
  const sums = new Float64Array(n + whole);
  return oneByOne(n, (x, from, out, outFrom) => {
    for (let t = 0; t < n; t++) out[outFrom + t] = 0;
    addBox(x, from, n, whole, sums, out, outFrom, (1 - above) / whole);
    if (above > 0) addBox(x, from, n, whole + 1, sums, out, outFrom, above / (whole + 1));
  });
}

function addBox(
  x: Float64Array,
  from: number,
  n: number,
  length: number,
  sums: Float64Array,
  out: Float64Array,
  outFrom: number,
  factor: number,
): void {
  const total = n + length - 1;
  let running = 0;
  for (let s = 0; s < length && s < n; s++) {
    running += x[from + s]!;
    sums[s] = running;
  }
  for (let s = length; s < n; s++) {
    running += x[from + s]! - x[from + s - length]!;
    sums[s] = running;
  }
  for (let s = n; s < length; s++) sums[s] = running;
  for (let s = Math.max(n, length); s < total; s++) {
    running -= x[from + s - length]!;
    sums[s] = running;
  }
  running = 0;
  for (let s = 0; s < length - 1; s++) running += sums[s]!;
  for (let t = 0; t < n; t++) {
    running += sums[t + length - 1]!;
    out[outFrom + t]! += factor * running;
    running -= sums[t]!;
  }
}
