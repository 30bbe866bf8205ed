import { symmetricEigenvalues } from "./eigenvalues.js";
import { matrix } from "./matrix.js";
import { dot } from "./products.js";
import { counterRandom } from "./random.js";

/**
 * About `count` leading eigenvalues, largest first, of a symmetric positive semidefinite operator on vectors of
 * length n given by its product with a vector: Lanczos with full reorthogonalisation from a fixed start. The
 * largest are right to rounding, the last of them only roughly. `apply(x, out)` writes A·x into `out`.
 */
export function leadingEigenvalues(
  apply: (x: Float64Array, out: Float64Array) => void,
  n: number,
  count: number,
): Float64Array {
  const steps = Math.min(n, count);
  const basis: Float64Array[] = [];
  const diagonal: number[] = [];
  const off: number[] = [];
  let v = counterRandom(1, 1).fillNormal(new Float64Array(n));
  scale(v, 1 / Math.sqrt(dot(v, v)));
  const w = new Float64Array(n);
  for (let step = 0; step < steps; step++) {
    basis.push(v);
    apply(v, w);
    diagonal.push(dot(v, w));
    // Twice is enough (Kahan; Parlett 1980).
    for (let pass = 0; pass < 2; pass++) for (const q of basis) subtract(w, q, dot(q, w));
    const size = Math.sqrt(dot(w, w));
    if (size < 1e-14 * Math.abs(diagonal[0]!)) break;
    off.push(size);
    v = Float64Array.from(w);
    scale(v, 1 / size);
  }
  const m = diagonal.length;
  const small = matrix(m, m);
  for (let i = 0; i < m; i++) {
    small.data[i * m + i] = diagonal[i]!;
    if (i + 1 < m) {
      small.data[i * m + i + 1] = off[i]!;
      small.data[(i + 1) * m + i] = off[i]!;
    }
  }
  return symmetricEigenvalues(small);
}

function scale(x: Float64Array, factor: number): void {
  for (let i = 0; i < x.length; i++) x[i]! *= factor;
}

function subtract(x: Float64Array, q: Float64Array, weight: number): void {
  for (let i = 0; i < x.length; i++) x[i]! -= weight * q[i]!;
}
