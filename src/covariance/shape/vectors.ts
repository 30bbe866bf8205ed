/** a'b in four interleaved sums, which the processor can overlap. */
export function dot(a: Float64Array, b: Float64Array): number {
  const n = a.length;
  const whole = n - (n % 4);
  let s0 = 0;
  let s1 = 0;
  let s2 = 0;
  let s3 = 0;
  for (let t = 0; t < whole; t += 4) {
    s0 += a[t]! * b[t]!;
    s1 += a[t + 1]! * b[t + 1]!;
    s2 += a[t + 2]! * b[t + 2]!;
    s3 += a[t + 3]! * b[t + 3]!;
  }
  for (let t = whole; t < n; t++) s0 += a[t]! * b[t]!;
  return s0 + s1 + (s2 + s3);
}

/** x ← x + factor · y. */
export function addTimes(x: Float64Array, factor: number, y: Float64Array): void {
  for (let t = 0; t < x.length; t++) x[t]! += factor * y[t]!;
}

/** x ← factor · x. */
export function scale(x: Float64Array, factor: number): void {
  for (let t = 0; t < x.length; t++) x[t]! *= factor;
}
