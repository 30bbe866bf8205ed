import { fft } from "../../numeric/index.js";

/**
 * Squared modulus of Σ xₜ exp(−2πijt/T) at j = 0 .. ⌊T/2⌋, for a real series of any length T, by the chirp transform
 * (Bluestein 1970): the sum as a convolution of power-of-two length.
 */
export function periodogram(x: Float64Array): Float64Array {
  const T = x.length;
  let n = 1;
  while (n < 2 * T) n *= 2;
  const cos = new Float64Array(T);
  const sin = new Float64Array(T);
  for (let t = 0; t < T; t++) {
    // t² modulo 2T, exact below T = 9×10⁷, keeps the angle small
    const angle = (Math.PI * ((t * t) % (2 * T))) / T;
    cos[t] = Math.cos(angle);
    sin[t] = Math.sin(angle);
  }
  const ar = new Float64Array(n);
  const ai = new Float64Array(n);
  const br = new Float64Array(n);
  const bi = new Float64Array(n);
  for (let t = 0; t < T; t++) {
    ar[t] = x[t]! * cos[t]!;
    ai[t] = -x[t]! * sin[t]!;
    br[t] = cos[t]!;
    bi[t] = sin[t]!;
    if (t > 0) {
      br[n - t] = cos[t]!;
      bi[n - t] = sin[t]!;
    }
  }
  fft(ar, ai);
  fft(br, bi);
  for (let i = 0; i < n; i++) {
    const re = ar[i]! * br[i]! - ai[i]! * bi[i]!;
    ai[i] = ar[i]! * bi[i]! + ai[i]! * br[i]!;
    ar[i] = re;
  }
  fft(ai, ar); // parts swapped: the inverse, n times too large
  const result = new Float64Array(Math.floor(T / 2) + 1);
  for (let j = 0; j < result.length; j++) result[j] = (ar[j]! / n) ** 2 + (ai[j]! / n) ** 2;
  return result;
}
