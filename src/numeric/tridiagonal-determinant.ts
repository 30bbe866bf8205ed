import type { Matrix } from "./matrix.js";

/** Rows whose logarithms are added before they join the whole sum, which costs less to rounding. */
const blockRows = 128;

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
  let blockSize = 0;
  let blockAngle = 0;
  // The pivot of the row before less one, where this row and it share one logarithm.
  let heldR = 0;
  let heldI = 0;
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
    // Pivots hardly differ from row to row, so neither do their rounding errors, and T of them would add up: what is
    // rounded is the pivot less one.
    const er = -level * re - off * (lr * re - li * im);
    pr = 1 + er;
    pi = -level * im - off * (lr * im + li * re);
    const size = pr * pr + pi * pi;
    if (t % 2 === 0 && t !== T - 1) {
      heldR = er;
      heldI = pi;
    } else {
      // Both angles are within a right angle, so that of the product is the sum.
      const productR = er + heldR + (er * heldR - pi * heldI);
      const productI = pi + heldI + (er * heldI + pi * heldR);
      blockSize += logOfSquare(productR, productI);
      if (im !== 0) blockAngle += Math.atan2(productI, 1 + productR);
      heldR = 0;
      heldI = 0;
      if (t % blockRows === blockRows - 1 || t === T - 1) {
        logSize += blockSize;
        angle += blockAngle;
        blockSize = 0;
        blockAngle = 0;
      }
    }
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

/** log |1 + a + bi|². */
function logOfSquare(a: number, b: number): number {
  const excess = 2 * a + a * a + b * b;
  return Math.abs(excess) < 0.5 ? Math.log1p(excess) : Math.log((1 + a) * (1 + a) + b * b);
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
