import { fft } from "./fft.js";

/**
 * Lagged products Σ_t x_t x_{t−j} for j = 0..maxLag (sums: not centred, not divided), by direct sums when the lags
 * are few and by Fourier transform otherwise.
 */
export function autocovariances(x: ArrayLike<number>, maxLag: number): Float64Array {
  const T = x.length;
  const lags = Math.min(maxLag, T - 1);
  const result = new Float64Array(maxLag + 1);
  let size = 1;
  while (size < T + lags + 1) size *= 2;
  if (lags * T > 12 * size * Math.log2(size)) {
    const re = new Float64Array(size);
    const im = new Float64Array(size);
    re.set(x);
    fft(re, im);
    for (let i = 0; i < size; i++) {
      re[i] = re[i]! * re[i]! + im[i]! * im[i]!;
      im[i] = 0;
    }
    fft(re, im);
    for (let j = 0; j <= lags; j++) result[j] = re[j]! / size;
    return result;
  }
  for (let j = 0; j <= lags; j++) {
    let sum = 0;
    for (let t = j; t < T; t++) sum += x[t]! * x[t - j]!;
    result[j] = sum;
  }
  return result;
}
