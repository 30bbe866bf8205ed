import { shortTransform } from "./fft-short.js";
import { shortFactors, turns } from "./fourier-factors.js";
import { roughWorkspace } from "./wasm.js";

/** Shorter ones are not worth a kernel's memory. */
const SHORT = 64;
/** Short transforms that run side by side. */
const BATCH = 8;

/**
 * Discrete Fourier transform in place of a complex series of length 2^m: X_j = Σ x_t e^{−2πijt/n}. As n₁ short transforms
 * of length n₂ and n₂ of length n₁ (Bailey 1990), each by radix four. The inverse is the transform of the swapped
 * parts, divided by n.
 */
export function fft(re: Float64Array, im: Float64Array): void {
  const n = re.length;
  if (n & (n - 1) || im.length !== n)
    throw new RangeError(`fft: both parts must have one length, a power of two, not ${n} and ${im.length}`);
  if (n < SHORT) {
    shortTransform(re, im);
    return;
  }
  const n1 = 2 ** Math.ceil(Math.log2(n) / 2);
  const n2 = n / n1;
  const factors = [shortFactors(n1), shortFactors(n2), ...turns(n, n1)];
  const lengths = factors.map((table) => table.length);
  const { kernels, numbers, at } = roughWorkspace(n, n, n, n, 2 * BATCH * n1, ...lengths);
  const [x, y, toX, toY, work, ...tables] = at as [number, number, number, number, number, ...number[]];
  numbers.set(re, x);
  numbers.set(im, y);
  factors.forEach((table, i) => {
    numbers.set(table, tables[i]!);
  });
  const [factors1, factors2, coarse, fine] = tables.map((start) => 8 * start) as [
    number,
    number,
    number,
    number,
  ];
  kernels.fourier(
    ...([8 * x, 8 * y, 8 * toX, 8 * toY, n1, n2] as const),
    ...([factors1, factors2, coarse, fine, Math.log2(n1), 8 * work] as const),
  );
  re.set(numbers.subarray(toX, toX + n));
  im.set(numbers.subarray(toY, toY + n));
}
