/*
 * Hot loops over stretches of typed arrays. Places are given as offsets, since a subarray costs more to make than a short
 * loop over it.
 */

/** Σ a[aFrom + t] b[bFrom + t] over n entries, in four interleaved sums, which the processor can overlap. */
export function dotAt(a: Float64Array, aFrom: number, b: Float64Array, bFrom: number, n: number): number {
  const whole = n - (n % 4);
  let s0 = 0;
  let s1 = 0;
  let s2 = 0;
  let s3 = 0;
  for (let t = 0; t < whole; t += 4) {
    const i = aFrom + t;
    const j = bFrom + t;
    s0 += a[i]! * b[j]!;
    s1 += a[i + 1]! * b[j + 1]!;
    s2 += a[i + 2]! * b[j + 2]!;
    s3 += a[i + 3]! * b[j + 3]!;
  }
  for (let t = whole; t < n; t++) s0 += a[aFrom + t]! * b[bFrom + t]!;
  return s0 + s1 + (s2 + s3);
}

/** x[xFrom + t] += factor · y[yFrom + t] over n entries. */
export function addTimesAt(
  x: Float64Array,
  xFrom: number,
  factor: number,
  y: Float64Array,
  yFrom: number,
  n: number,
): void {
  const whole = n - (n % 4);
  for (let t = 0; t < whole; t += 4) {
    const i = xFrom + t;
    const j = yFrom + t;
    x[i]! += factor * y[j]!;
    x[i + 1]! += factor * y[j + 1]!;
    x[i + 2]! += factor * y[j + 2]!;
    x[i + 3]! += factor * y[j + 3]!;
  }
  for (let t = whole; t < n; t++) x[xFrom + t]! += factor * y[yFrom + t]!;
}

/** a'b. */
export function dot(a: Float64Array, b: Float64Array): number {
  return dotAt(a, 0, b, 0, a.length);
}

/** x ← x + factor · y. */
export function addTimes(x: Float64Array, factor: number, y: Float64Array): void {
  addTimesAt(x, 0, factor, y, 0, x.length);
}

/** x ← factor · x. */
export function scale(x: Float64Array, factor: number): void {
  for (let t = 0; t < x.length; t++) x[t]! *= factor;
}
