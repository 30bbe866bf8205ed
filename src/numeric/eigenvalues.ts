import type { Matrix } from "./matrix.js";

/**
 * Eigenvalues of a symmetric matrix, largest first, without its vectors: Householder reduction to tridiagonal
 * form, then the implicit QL iteration (Bowdler, Martin, Reinsch and Wilkinson 1968). The matrix is left alone.
 * O(n³), a third of what the vectors would cost.
 */
export function symmetricEigenvalues(a: Matrix): Float64Array {
  const { diagonal, off } = tridiagonal(a);
  return implicitQl(diagonal, off).sort().reverse();
}

function tridiagonal(a: Matrix): { diagonal: Float64Array; off: Float64Array } {
  const n = a.rows;
  const s = Float64Array.from(a.data);
  const diagonal = new Float64Array(n);
  const off = new Float64Array(n);
  const v = new Float64Array(n);
  const p = new Float64Array(n);
  for (let k = 0; k < n - 1; k++) {
    diagonal[k] = s[k * n + k]!;
    const column = s.subarray(k * n, (k + 1) * n);
    let scale = 0;
    for (let i = k + 1; i < n; i++) scale = Math.max(scale, Math.abs(column[i]!));
    if (scale === 0) continue;
    let sum = 0;
    for (let i = k + 1; i < n; i++) {
      v[i] = column[i]! / scale;
      sum += v[i]! * v[i]!;
    }
    const alpha = v[k + 1]! > 0 ? -Math.sqrt(sum) : Math.sqrt(sum);
    off[k] = alpha * scale;
    const half = sum - alpha * v[k + 1]!;
    v[k + 1]! -= alpha;
    if (half === 0) continue;
    p.fill(0);
    for (let j = k + 1; j < n; j++) {
      const source = s.subarray(j * n, (j + 1) * n);
      const weight = v[j]!;
      let inner = source[j]! * weight;
      for (let i = j + 1; i < n; i++) {
        const value = source[i]!;
        p[i]! += value * weight;
        inner += value * v[i]!;
      }
      p[j]! += inner;
    }
    let shift = 0;
    for (let i = k + 1; i < n; i++) {
      p[i] = p[i]! / half;
      shift += p[i]! * v[i]!;
    }
    shift /= 2 * half;
    for (let i = k + 1; i < n; i++) p[i]! -= shift * v[i]!;
    for (let j = k + 1; j < n; j++) {
      const target = s.subarray(j * n, (j + 1) * n);
      const vj = v[j]!;
      const pj = p[j]!;
      for (let i = j; i < n; i++) target[i]! -= v[i]! * pj + p[i]! * vj;
    }
  }
  diagonal[n - 1] = s[n * n - 1]!;
  return { diagonal, off };
}

function implicitQl(d: Float64Array, e: Float64Array): Float64Array {
  const n = d.length;
  // Among eigenvalues that are all zero but for rounding no off-diagonal entry is small beside its neighbours.
  let norm = 0;
  for (let i = 0; i < n; i++) norm = Math.max(norm, Math.abs(d[i]!) + Math.abs(e[i] ?? 0));
  for (let l = 0; l < n; l++) {
    for (let sweep = 0; ; sweep++) {
      let m = l;
      while (m < n - 1) {
        const size = Math.abs(d[m]!) + Math.abs(d[m + 1]!) + norm;
        if (Math.abs(e[m]!) <= Number.EPSILON * size) break;
        m++;
      }
      if (m === l) break;
      if (sweep > 60) throw new Error("the QL iteration for eigenvalues did not converge");
      let g = (d[l + 1]! - d[l]!) / (2 * e[l]!);
      let r = Math.hypot(g, 1);
      g = d[m]! - d[l]! + e[l]! / (g + (g >= 0 ? r : -r));
      let s = 1;
      let c = 1;
      let p = 0;
      let i = m - 1;
      for (; i >= l; i--) {
        const f = s * e[i]!;
        const b = c * e[i]!;
        r = Math.hypot(f, g);
        e[i + 1] = r;
        if (r === 0) {
          d[i + 1]! -= p;
          e[m] = 0;
          break;
        }
        s = f / r;
        c = g / r;
        g = d[i + 1]! - p;
        r = (d[i]! - g) * s + 2 * c * b;
        p = s * r;
        d[i + 1] = g + p;
        g = c * r - b;
      }
      if (r === 0 && i >= l) continue;
      d[l]! -= p;
      e[l] = g;
      e[m] = 0;
    }
  }
  return d;
}
