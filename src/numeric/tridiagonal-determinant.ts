import type { Matrix } from "./matrix.js";

/**
 * log det B + log det(Q'B⁻¹Q) for B = I − 2z(A − dI), A symmetric tridiagonal with diagonal `diagonal` and
 * off-diagonal `links[t]` between rows t − 1 and t, z = re + i·im: the logarithm of the determinant of B restricted
 * to the complement of the columns of Q, as [real, imaginary]. B's real part must be positive definite; then every
 * pivot has a positive real part and the principal logarithms add up on the right branch. O(T k²).
 */
export function orthogonalLogDeterminant(
  diagonal: Float64Array,
  links: Float64Array,
  d: number,
  re: number,
  im: number,
  Q: Matrix,
): [number, number] {
  const T = diagonal.length;
  const k = Q.columns;
  const yr = new Float64Array(k);
  const yi = new Float64Array(k);
  const cr = new Float64Array(k * k);
  const ci = new Float64Array(k * k);
  let pr = 1;
  let pi = 0;
  let logSize = 0;
  let angle = 0;
  for (let t = 0; t < T; t++) {
    const level = 2 * (diagonal[t]! - d);
    const off = -2 * links[t]!;
    // ℓ = off·z / pivot of the row before.
    let lr = 0;
    let li = 0;
    if (off !== 0) {
      const size = pr * pr + pi * pi;
      lr = (off * (re * pr + im * pi)) / size;
      li = (off * (im * pr - re * pi)) / size;
    }
    pr = 1 - level * re - off * (lr * re - li * im);
    pi = -level * im - off * (lr * im + li * re);
    const size = pr * pr + pi * pi;
    logSize += Math.log(size);
    if (im !== 0) angle += Math.atan2(pi, pr);
    const ir = pr / size;
    const ii = -pi / size;
    for (let j = 0; j < k; j++) {
      const a = Q.data[j * T + t]! - (lr * yr[j]! - li * yi[j]!);
      const b = -(lr * yi[j]! + li * yr[j]!);
      yr[j] = a;
      yi[j] = b;
      const sr = a * ir - b * ii;
      const si = a * ii + b * ir;
      for (let i = 0; i <= j; i++) {
        cr[j * k + i]! += sr * yr[i]! - si * yi[i]!;
        ci[j * k + i]! += sr * yi[i]! + si * yr[i]!;
      }
    }
  }
  const [small, smallAngle] = smallLogDeterminant(cr, ci, k);
  return [logSize / 2 + small, angle + smallAngle];
}

/** log det of a complex symmetric k×k matrix given by its upper triangle, by LDL' with principal logarithms. */
function smallLogDeterminant(cr: Float64Array, ci: Float64Array, k: number): [number, number] {
  let logSize = 0;
  let angle = 0;
  for (let j = 0; j < k; j++) {
    const pr = cr[j * k + j]!;
    const pi = ci[j * k + j]!;
    const size = pr * pr + pi * pi;
    logSize += Math.log(size) / 2;
    angle += Math.atan2(pi, pr);
    for (let m = j + 1; m < k; m++) {
      const ar = (cr[m * k + j]! * pr + ci[m * k + j]! * pi) / size;
      const ai = (ci[m * k + j]! * pr - cr[m * k + j]! * pi) / size;
      for (let n = m; n < k; n++) {
        const br = cr[n * k + j]!;
        const bi = ci[n * k + j]!;
        cr[n * k + m]! -= ar * br - ai * bi;
        ci[n * k + m]! -= ar * bi + ai * br;
      }
    }
  }
  return [logSize, angle];
}
