/**
 * Householder reduction of a symmetric n×n matrix (column-major, overwritten) to tridiagonal form by reflections that
 * leave the first axis alone, so that the first components of the tridiagonal matrix's eigenvectors are those of
 * the matrix itself.
 */
export function tridiagonalise(a: Float64Array, n: number): { diagonal: Float64Array; side: Float64Array } {
  const diagonal = new Float64Array(n);
  const side = new Float64Array(n);
  const v = new Float64Array(n);
  const p = new Float64Array(n);
  for (let c = 0; c < n; c++) {
    diagonal[c] = a[c * n + c]!;
    if (c === n - 1) break;
    let square = 0;
    for (let i = c + 1; i < n; i++) {
      v[i] = a[c * n + i]!;
      square += v[i]! * v[i]!;
    }
    const head = v[c + 1]!;
    const length = Math.sqrt(square);
    side[c] = head > 0 ? -length : length;
    const tail = square - head * head;
    if (!(tail > 0)) {
      side[c] = head;
      continue;
    }
    v[c + 1] = head - side[c]!;
    const half = (tail + v[c + 1]! ** 2) / 2;
    reflect(a, n, c + 1, v, p, half);
  }
  return { diagonal, side };
}

/** A ← HAH on rows and columns from `from` on, H = I − vv'/half. */
function reflect(
  a: Float64Array,
  n: number,
  from: number,
  v: Float64Array,
  p: Float64Array,
  half: number,
): void {
  for (let i = from; i < n; i++) p[i] = 0;
  for (let j = from; j < n; j++) {
    const vj = v[j]!;
    if (vj === 0) continue;
    for (let i = from; i < n; i++) p[i]! += a[j * n + i]! * vj;
  }
  let inner = 0;
  for (let i = from; i < n; i++) {
    p[i]! /= half;
    inner += p[i]! * v[i]!;
  }
  const shift = inner / (2 * half);
  for (let i = from; i < n; i++) p[i]! -= shift * v[i]!;
  for (let j = from; j < n; j++) {
    const vj = v[j]!;
    const pj = p[j]!;
    for (let i = from; i < n; i++) a[j * n + i]! -= v[i]! * pj + p[i]! * vj;
  }
}
