/**
 * Eigenvalues of a symmetric tridiagonal matrix by the QL iteration with implicit shifts (Dubrulle, Martin and
 * Wilkinson 1968), unordered. Both arguments are overwritten.
 *
 * @param diagonal n entries; becomes the eigenvalues.
 * @param side n entries: side[i] couples i and i + 1, the last one is workspace.
 * @param first optional: a row that the rotations act on. Given the first unit vector it becomes the eigenvectors'
 *   first components.
 */
export function tridiagonalEigenvalues(
  diagonal: Float64Array,
  side: Float64Array,
  first?: Float64Array,
): void {
  const n = diagonal.length;
  if (n > 0) side[n - 1] = 0;
  // Among eigenvalues that are all zero but for rounding no side entry is small beside its neighbours.
  let norm = 0;
  for (let i = 0; i < n; i++) norm = Math.max(norm, Math.abs(diagonal[i]!) + Math.abs(side[i]!));
  for (let l = 0; l < n; l++) {
    for (let sweep = 0; sweep < 60; sweep++) {
      let m = l;
      for (; m < n - 1; m++) {
        const scale = Math.abs(diagonal[m]!) + Math.abs(diagonal[m + 1]!) + norm;
        if (Math.abs(side[m]!) <= Number.EPSILON * scale) break;
      }
      if (m === l) break;
      step(diagonal, side, l, m, first);
    }
  }
}

/** One implicit QL step on rows l to m. */
function step(d: Float64Array, e: Float64Array, l: number, m: number, first: Float64Array | undefined): void {
  let g = (d[l + 1]! - d[l]!) / (2 * e[l]!);
  let r = Math.hypot(g, 1);
  g = d[m]! - d[l]! + e[l]! / (g + (g >= 0 ? r : -r));
  let s = 1;
  let c = 1;
  let p = 0;
  for (let i = m - 1; i >= l; i--) {
    const f = s * e[i]!;
    const b = c * e[i]!;
    r = Math.sqrt(f * f + g * g);
    e[i + 1] = r;
    if (r === 0) {
      d[i + 1]! -= p;
      e[m] = 0;
      return;
    }
    s = f / r;
    c = g / r;
    g = d[i + 1]! - p;
    r = (d[i]! - g) * s + 2 * c * b;
    p = s * r;
    d[i + 1] = g + p;
    g = c * r - b;
    if (first) {
      const z = first[i + 1]!;
      first[i + 1] = s * first[i]! + c * z;
      first[i] = c * first[i]! - s * z;
    }
  }
  d[l]! -= p;
  e[l] = g;
  e[m] = 0;
}
