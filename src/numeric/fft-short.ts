import { unitRoot } from "./fourier-factors.js";

/** The transform of a short series in place, length 2^m: bits reversed, then radix two. */
export function shortTransform(re: Float64Array, im: Float64Array): void {
  const n = re.length;
  for (let i = 1, j = 0; i < n; i++) {
    let bit = n >> 1;
    for (; j & bit; bit >>= 1) j ^= bit;
    j ^= bit;
    if (i < j) {
      exchange(re, i, j);
      exchange(im, i, j);
    }
  }
  for (let size = 2; size <= n; size *= 2) {
    const half = size / 2;
    for (let m = 0; m < half; m++) {
      const [cos, sin] = unitRoot(m, size);
      for (let a = m; a < n; a += size) {
        const b = a + half;
        const x = re[b]! * cos + im[b]! * sin;
        const y = im[b]! * cos - re[b]! * sin;
        re[b] = re[a]! - x;
        im[b] = im[a]! - y;
        re[a]! += x;
        im[a]! += y;
      }
    }
  }
}

function exchange(values: Float64Array, i: number, j: number): void {
  const held = values[i]!;
  values[i] = values[j]!;
  values[j] = held;
}
