import { fft } from "../../numeric/index.js";

/** Real series are transformed two at a time. */
export interface Transforms {
  readonly re: Float64Array[];
  readonly im: Float64Array[];
}

/**
 * Σ_t x_t e^(−2πijt/period) for j = 0..count and each of some real series of one length, by Bluestein's chirp: with
 * jt = (j² + t² − (j − t)²)/2 the sums are a convolution, for any period. Angles are reduced in whole numbers. Two series share
 * a transform; their parts are told apart by the frequencies of both signs.
 */
export function chirpTransforms(list: readonly Float64Array[], period: number, count: number): Transforms {
  const n = list[0]?.length ?? 0;
  const size = 2 ** Math.ceil(Math.log2(n + 2 * count + 1));
  const { cos, sin } = chirp(n + count, period);
  const kernelRe = new Float64Array(size);
  const kernelIm = new Float64Array(size);
  for (let m = -(n - 1) - count; m <= count; m++) {
    const at = (m + size) % size;
    kernelRe[at] = cos[Math.abs(m)]!;
    kernelIm[at] = sin[Math.abs(m)]!;
  }
  fft(kernelRe, kernelIm);
  const result: Transforms = { re: [], im: [] };
  const x = new Float64Array(size);
  const y = new Float64Array(size);
  for (let a = 0; a < list.length; a += 2) {
    x.fill(0);
    y.fill(0);
    x.set(list[a]!);
    if (a + 1 < list.length) y.set(list[a + 1]!);
    for (let p = 0; p < n; p++) turnBack(x, y, p, cos[p]!, sin[p]!);
    fft(x, y);
    for (let f = 0; f < size; f++) {
      const re = x[f]! * kernelRe[f]! - y[f]! * kernelIm[f]!;
      y[f] = x[f]! * kernelIm[f]! + y[f]! * kernelRe[f]!;
      x[f] = re;
    }
    fft(y, x);
    const parts = [0, 1, 2, 3].map(() => new Float64Array(count + 1));
    const [aRe, aIm, bRe, bIm] = parts as [Float64Array, Float64Array, Float64Array, Float64Array];
    for (let j = 0; j <= count; j++) {
      const minus = j === 0 ? 0 : size - j;
      turnBack(x, y, j, cos[j]!, sin[j]!);
      if (j > 0) turnBack(x, y, minus, cos[j]!, sin[j]!);
      // Of z = a + ib, frequency ±j: A = (Z₊ + conj Z₋)/2 and B = (Z₊ − conj Z₋)/2i.
      aRe[j] = (x[j]! + x[minus]!) / (2 * size);
      aIm[j] = (y[j]! - y[minus]!) / (2 * size);
      bRe[j] = (y[j]! + y[minus]!) / (2 * size);
      bIm[j] = (x[minus]! - x[j]!) / (2 * size);
    }
    result.re.push(aRe, bRe);
    result.im.push(aIm, bIm);
  }
  return { re: result.re.slice(0, list.length), im: result.im.slice(0, list.length) };
}

/** e^(πim²/period) for m below `length`. */
function chirp(length: number, period: number): { cos: Float64Array; sin: Float64Array } {
  const cos = new Float64Array(length);
  const sin = new Float64Array(length);
  for (let m = 0; m < length; m++) {
    const angle = (Math.PI * ((m * m) % (2 * period))) / period;
    cos[m] = Math.cos(angle);
    sin[m] = Math.sin(angle);
  }
  return { cos, sin };
}

/** (x + iy) at one place, times c − is. */
function turnBack(x: Float64Array, y: Float64Array, at: number, c: number, s: number): void {
  const re = x[at]! * c + y[at]! * s;
  y[at] = y[at]! * c - x[at]! * s;
  x[at] = re;
}
