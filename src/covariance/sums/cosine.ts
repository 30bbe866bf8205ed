import { fft, type Matrix, matrix } from "../../numeric/index.js";
import { dot } from "../shape/vectors.js";
import { copyRows, type Series } from "./series.js";

/** Up to this many products n·ν the coefficients are summed as they stand. */
const DIRECT = 2_000_000;

/**
 * (n/ν) Σ_{j ≤ ν} Λ_j Λ_j' with Λ_j = √(2/n) Σ_t v_t cos(πj(t − ½)/n): the equal-weighted cosine estimate on the scale of a
 * sum over n periods.
 */
export function cosineSum(series: Series, nu: number, direct = DIRECT): Matrix {
  const { rows: n, columns: k } = series.columns;
  const coefficients = n * nu <= direct ? directly(series, nu) : byChirp(series, nu);
  const result = matrix(k, k);
  for (let j = 0; j < k; j++) {
    for (let i = 0; i <= j; i++) {
      result.data[j * k + i] = result.data[i * k + j] = (2 / nu) * dot(coefficients[i]!, coefficients[j]!);
    }
  }
  return result;
}

/** Σ_t v_t cos(πj(t − ½)/n) for j = 1..ν and every column, angles reduced in whole numbers. */
function directly(series: Series, nu: number): Float64Array[] {
  const { rows: n, columns: k } = series.columns;
  const table = Float64Array.from({ length: 4 * n }, (_, m) => Math.cos((Math.PI * m) / (2 * n)));
  const columns = Array.from({ length: k }, (_, j) => {
    const column = new Float64Array(n);
    copyRows(series, j, 0, n, column, 0);
    return column;
  });
  const result = columns.map(() => new Float64Array(nu));
  const wave = new Float64Array(n);
  for (let j = 1; j <= nu; j++) {
    let angle = j;
    for (let t = 0; t < n; t++) {
      wave[t] = table[angle]!;
      angle += 2 * j;
      if (angle >= 4 * n) angle -= 4 * n;
    }
    for (let a = 0; a < k; a++) result[a]![j - 1] = dot(columns[a]!, wave);
  }
  return result;
}

/**
 * The same by Bluestein's chirp: with jt = (j² + t² − (j − t)²)/2 the sums Σ v_t e^(−iπjt/n) for |j| ≤ ν are a convolution, for any n.
 * Two columns share a transform; their parts are told apart by the frequencies of both signs.
 */
function byChirp(series: Series, nu: number): Float64Array[] {
  const { rows: n, columns: k } = series.columns;
  const size = 2 ** Math.ceil(Math.log2(n + 2 * nu + 1));
  // e^(iπm²/2n) for m up to n + ν, angles reduced in whole numbers.
  const chirpCos = new Float64Array(n + nu);
  const chirpSin = new Float64Array(n + nu);
  for (let m = 0; m < n + nu; m++) {
    const angle = (Math.PI * ((m * m) % (4 * n))) / (2 * n);
    chirpCos[m] = Math.cos(angle);
    chirpSin[m] = Math.sin(angle);
  }
  const kernelRe = new Float64Array(size);
  const kernelIm = new Float64Array(size);
  for (let m = -(n - 1) - nu; m <= nu; m++) {
    const at = (m + size) % size;
    kernelRe[at] = chirpCos[Math.abs(m)]!;
    kernelIm[at] = chirpSin[Math.abs(m)]!;
  }
  fft(kernelRe, kernelIm);
  const result: Float64Array[] = [];
  const x = new Float64Array(size);
  const y = new Float64Array(size);
  for (let a = 0; a < k; a += 2) {
    x.fill(0);
    y.fill(0);
    copyRows(series, a, 0, n, x, 0);
    if (a + 1 < k) copyRows(series, a + 1, 0, n, y, 0);
    for (let t = 0; t < n; t++) turnBack(x, y, t, chirpCos[t]!, chirpSin[t]!);
    fft(x, y);
    for (let f = 0; f < size; f++) {
      const re = x[f]! * kernelRe[f]! - y[f]! * kernelIm[f]!;
      y[f] = x[f]! * kernelIm[f]! + y[f]! * kernelRe[f]!;
      x[f] = re;
    }
    fft(y, x);
    const first = new Float64Array(nu);
    const second = new Float64Array(nu);
    for (let j = 1; j <= nu; j++) {
      const minus = size - j;
      turnBack(x, y, j, chirpCos[j]!, chirpSin[j]!);
      turnBack(x, y, minus, chirpCos[j]!, chirpSin[j]!);
      // Of z = a + ib, frequency ±j: A = (Z₊ + conj Z₋)/2 and B = (Z₊ − conj Z₋)/2i; half a period more turns by e^(−iπj/2n).
      const aRe = (x[j]! + x[minus]!) / (2 * size);
      const aIm = (y[j]! - y[minus]!) / (2 * size);
      const bRe = (y[j]! + y[minus]!) / (2 * size);
      const bIm = (x[minus]! - x[j]!) / (2 * size);
      const half = (Math.PI * j) / (2 * n);
      first[j - 1] = aRe * Math.cos(half) + aIm * Math.sin(half);
      second[j - 1] = bRe * Math.cos(half) + bIm * Math.sin(half);
    }
    result.push(first, second);
  }
  return result.slice(0, k);
}

/** (x + iy) at one place, times c − is. */
function turnBack(x: Float64Array, y: Float64Array, at: number, c: number, s: number): void {
  const re = x[at]! * c + y[at]! * s;
  y[at] = y[at]! * c - x[at]! * s;
  x[at] = re;
}
