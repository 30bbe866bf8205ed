import { fft, type Matrix, matrix } from "../../numeric/index.js";
import { dotAt } from "../shape/vectors.js";
import { copyRows, type Series } from "./series.js";

/** The Fourier transforms of the columns at frequencies 0 to N/2, N a power of two. */
interface Spectra {
  readonly size: number;
  readonly re: readonly Float64Array[];
  readonly im: readonly Float64Array[];
}

const known = new WeakMap<Series, Spectra>();
const BLOCK = 2048;
/** Long series are kept one at a time: their transforms are as large as the data. */
const LONG = 100_000;
let latestLong: { series: WeakRef<Series>; spectra: Spectra } | undefined;

/**
 * Σ_j κ_j Σ_t v_t v'_{t−j} for many lags: N⁻¹ Σ_f κ̂_f V_f V_f*, with V the transform of the series padded to N ≥ n + last.
 * The transforms are made once per series, after which a kernel and bandwidth cost one transform of the weights.
 */
export function spectralSum(series: Series, weights: Float64Array): Matrix {
  const { rows: n, columns: k } = series.columns;
  const { size, re, im } = spectraOf(series, n + weights.length - 1);
  const window = transformedWeights(weights, size);
  const result = matrix(k, k);
  const weighted = new Float64Array(BLOCK);
  const weightedIm = new Float64Array(BLOCK);
  // In blocks that stay in the processor's cache while every pair of columns goes through them.
  for (let from = 0; from < window.length; from += BLOCK) {
    const length = Math.min(BLOCK, window.length - from);
    for (let j = 0; j < k; j++) {
      for (let f = 0; f < length; f++) {
        weighted[f] = window[from + f]! * re[j]![from + f]!;
        weightedIm[f] = window[from + f]! * im[j]![from + f]!;
      }
      for (let i = 0; i <= j; i++) {
        result.data[j * k + i]! +=
          dotAt(weighted, 0, re[i]!, from, length) + dotAt(weightedIm, 0, im[i]!, from, length);
      }
    }
  }
  for (let j = 0; j < k; j++) for (let i = 0; i < j; i++) result.data[i * k + j] = result.data[j * k + i]!;
  return result;
}

/** κ̂ at frequencies 0 to N/2, with the weights that a half spectrum needs and 1/N taken in. */
function transformedWeights(weights: Float64Array, size: number): Float64Array {
  const re = new Float64Array(size);
  const im = new Float64Array(size);
  re.set(weights);
  for (let j = 1; j < weights.length; j++) re[size - j] = weights[j]!;
  fft(re, im);
  const half = size / 2;
  const window = re.subarray(0, half + 1);
  for (let f = 0; f <= half; f++) window[f]! *= (f === 0 || f === half ? 1 : 2) / size;
  return window;
}

function spectraOf(series: Series, length: number): Spectra {
  const long = series.columns.rows > LONG;
  const held = long && latestLong?.series.deref() === series ? latestLong.spectra : known.get(series);
  const size = 2 ** Math.ceil(Math.log2(Math.max(length, 4)));
  if (held && held.size >= size) return held;
  const spectra = transform(series, size);
  if (long) latestLong = { series: new WeakRef(series), spectra };
  else known.set(series, spectra);
  return spectra;
}

/** Two real columns share one complex transform. */
function transform(series: Series, size: number): Spectra {
  const { rows: n, columns: k } = series.columns;
  const half = size / 2;
  const re: Float64Array[] = [];
  const im: Float64Array[] = [];
  const x = new Float64Array(size);
  const y = new Float64Array(size);
  for (let j = 0; j < k; j += 2) {
    x.fill(0);
    y.fill(0);
    copyRows(series, j, 0, n, x, 0);
    if (j + 1 < k) copyRows(series, j + 1, 0, n, y, 0);
    fft(x, y);
    const parts = [0, 1, 2, 3].map(() => new Float64Array(half + 1));
    const [aRe, aIm, bRe, bIm] = parts as [Float64Array, Float64Array, Float64Array, Float64Array];
    for (let f = 0; f <= half; f++) {
      const g = f === 0 ? 0 : size - f;
      aRe[f] = (x[f]! + x[g]!) / 2;
      aIm[f] = (y[f]! - y[g]!) / 2;
      bRe[f] = (y[f]! + y[g]!) / 2;
      bIm[f] = (x[g]! - x[f]!) / 2;
    }
    re.push(aRe, bRe);
    im.push(aIm, bIm);
  }
  return { size, re: re.slice(0, k), im: im.slice(0, k) };
}
