import { longTransform } from "./fft-long.js";

/** Longer transforms are made of shorter ones. */
const LONG = 2 ** 15;

/**
 * Discrete Fourier transform in place of a complex series of length 2^m: X_j = Σ x_t e^{−2πijt/n}. Radix four with one
 * radix-two pass where m is odd, twiddle factors by table. The inverse is the transform of the swapped parts,
 * divided by n.
 */
export function fft(re: Float64Array, im: Float64Array): void {
  const n = re.length;
  if (n & (n - 1)) throw new RangeError(`fft: the length must be a power of two, not ${n}`);
  if (n > LONG) longTransform(re, im, fft);
  else if (n > 1) short(re, im);
}

function short(re: Float64Array, im: Float64Array): void {
  const { reversed, passes } = planOf(re.length);
  exchange(re, im, reversed);
  for (const pass of passes) {
    if (pass.twiddles) fours(re, im, pass.size, pass.twiddles.cos, pass.twiddles.sin);
    else twos(re, im);
  }
}

/** Merges transforms of length `quarter` (or halves, in a radix-two pass) to transforms of length `size`. */
interface Pass {
  readonly size: number;
  /** e^{−2πim/size} for m below size/4, then its square and its cube; absent in a radix-two pass. */
  readonly twiddles?: { readonly cos: Float64Array; readonly sin: Float64Array };
}

interface Plan {
  /** Pairs of places that change places. */
  readonly reversed: Uint32Array;
  readonly passes: readonly Pass[];
}

const plans = new Map<number, Plan>();

function planOf(n: number): Plan {
  let plan = plans.get(n);
  if (!plan) {
    plan = { reversed: reversal(n), passes: passesOf(n) };
    plans.set(n, plan);
  }
  return plan;
}

function passesOf(n: number): Pass[] {
  const passes: Pass[] = [];
  let size = 1;
  if (Math.log2(n) % 2 === 1) {
    size = 2;
    passes.push({ size });
  }
  while (size < n) {
    size *= 4;
    const quarter = size / 4;
    const cos = new Float64Array(3 * quarter);
    const sin = new Float64Array(3 * quarter);
    for (let m = 0; m < quarter; m++) {
      for (let power = 1; power <= 3; power++) {
        const angle = (2 * Math.PI * m * power) / size;
        cos[3 * m + power - 1] = Math.cos(angle);
        sin[3 * m + power - 1] = Math.sin(angle);
      }
    }
    passes.push({ size, twiddles: { cos, sin } });
  }
  return passes;
}

function reversal(n: number): Uint32Array {
  const pairs: number[] = [];
  for (let i = 1, j = 0; i < n; i++) {
    let bit = n >> 1;
    for (; j & bit; bit >>= 1) j ^= bit;
    j ^= bit;
    if (i < j) pairs.push(i, j);
  }
  return Uint32Array.from(pairs);
}

function exchange(re: Float64Array, im: Float64Array, pairs: Uint32Array): void {
  for (let p = 0; p < pairs.length; p += 2) {
    const i = pairs[p]!;
    const j = pairs[p + 1]!;
    const x = re[i]!;
    const y = im[i]!;
    re[i] = re[j]!;
    im[i] = im[j]!;
    re[j] = x;
    im[j] = y;
  }
}

function fours(re: Float64Array, im: Float64Array, size: number, cos: Float64Array, sin: Float64Array): void {
  const n = re.length;
  const quarter = size / 4;
  for (let start = 0; start < n; start += size) {
    for (let m = 0, at = 0; m < quarter; m++, at += 3) {
      const a = start + m;
      const b = a + quarter;
      const c = b + quarter;
      const d = c + quarter;
      // In reversed order the second transform is of the even ones' odd half: it takes the squared factor.
      const c1 = cos[at]!;
      const s1 = sin[at]!;
      const c2 = cos[at + 1]!;
      const s2 = sin[at + 1]!;
      const c3 = cos[at + 2]!;
      const s3 = sin[at + 2]!;
      const br = re[b]! * c2 + im[b]! * s2;
      const bi = im[b]! * c2 - re[b]! * s2;
      const cr = re[c]! * c1 + im[c]! * s1;
      const ci = im[c]! * c1 - re[c]! * s1;
      const dr = re[d]! * c3 + im[d]! * s3;
      const di = im[d]! * c3 - re[d]! * s3;
      const evenR = re[a]! + br;
      const evenI = im[a]! + bi;
      const oddR = re[a]! - br;
      const oddI = im[a]! - bi;
      const sumR = cr + dr;
      const sumI = ci + di;
      const differenceR = cr - dr;
      const differenceI = ci - di;
      re[a] = evenR + sumR;
      im[a] = evenI + sumI;
      re[b] = oddR + differenceI;
      im[b] = oddI - differenceR;
      re[c] = evenR - sumR;
      im[c] = evenI - sumI;
      re[d] = oddR - differenceI;
      im[d] = oddI + differenceR;
    }
  }
}

function twos(re: Float64Array, im: Float64Array): void {
  for (let a = 0; a < re.length; a += 2) {
    const x = re[a + 1]!;
    const y = im[a + 1]!;
    re[a + 1] = re[a]! - x;
    im[a + 1] = im[a]! - y;
    re[a]! += x;
    im[a]! += y;
  }
}
