/**
 * Discrete Fourier transform in place of a complex series of length 2^m: X_j = Σ x_t e^{−2πijt/n}. Radix two with
 * twiddle factors by table. The inverse is the transform of the swapped parts, divided by n.
 */
export function fft(re: Float64Array, im: Float64Array): void {
  const n = re.length;
  if (n & (n - 1)) throw new RangeError(`fft: the length must be a power of two, not ${n}`);
  for (let i = 1, j = 0; i < n; i++) {
    let bit = n >> 1;
    for (; j & bit; bit >>= 1) j ^= bit;
    j ^= bit;
    if (i < j) {
      [re[i], re[j]] = [re[j]!, re[i]!];
      [im[i], im[j]] = [im[j]!, im[i]!];
    }
  }
  const { cos, sin } = twiddles(n);
  for (let size = 2; size <= n; size *= 2) {
    const half = size / 2;
    const stride = n / size;
    for (let start = 0; start < n; start += size) {
      for (let m = 0, at = 0; m < half; m++, at += stride) {
        const a = start + m;
        const b = a + half;
        const xr = re[b]! * cos[at]! + im[b]! * sin[at]!;
        const xi = im[b]! * cos[at]! - re[b]! * sin[at]!;
        re[b] = re[a]! - xr;
        im[b] = im[a]! - xi;
        re[a]! += xr;
        im[a]! += xi;
      }
    }
  }
}

let table: { n: number; cos: Float64Array; sin: Float64Array } | undefined;

function twiddles(n: number): { cos: Float64Array; sin: Float64Array } {
  if (table?.n === n) return table;
  const cos = new Float64Array(n / 2);
  const sin = new Float64Array(n / 2);
  for (let i = 0; i < n / 2; i++) {
    cos[i] = Math.cos((2 * Math.PI * i) / n);
    sin[i] = Math.sin((2 * Math.PI * i) / n);
  }
  table = { n, cos, sin };
  return table;
}
