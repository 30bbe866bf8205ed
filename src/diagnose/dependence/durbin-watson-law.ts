import type { Matrix } from "../../numeric/index.js";
import { rowsEarlier } from "../parts/time.js";

/** Both tails of a law at one point; the smaller of them to full relative precision. */
export interface Tails {
  readonly lower: number;
  readonly upper: number;
}

/**
 * P(d' < d) and P(d' > d) for the Durbin–Watson ratio of T residuals from regressing independent normal errors on the
 * columns of an orthonormal `Q`, with neighbours as `periods` has them (across a gap there is no pair).
 *
 * With A the matrix of the sum of squared differences and M = I − QQ', Z = u'M(A − dI)Mu has
 * E exp(sZ) = [det B · det(Q'B⁻¹Q)]^(−½), B = I − 2s(A − dI), and B is tridiagonal: O(T k²) for one s. The tail on
 * the far side of the mean is the integral of exp(K(s))/|s| along the vertical line through its real saddle point; the
 * line is run through by sinh, which makes the trapezoidal rule converge geometrically. Durbin and Watson (1950, 1971)
 * and Imhof (1961) for the problem; Daniels (1954) for the contour.
 */
export function durbinWatsonTails(d: number, Q: Matrix, periods: Float64Array): Tails {
  const T = Q.rows;
  const k = Q.columns;
  const joined = Uint8Array.from(rowsEarlier(periods, 1), (row) => (row >= 0 ? 1 : 0));
  const degree = Float64Array.from(joined, (join, t) => join + (t + 1 < T ? joined[t + 1]! : 0));
  const mean = expected(Q, joined, degree) / (T - k);
  const below = d < mean;
  // between these B is positive definite whatever Q is: the eigenvalues of A lie in [0, 4)
  const bound = below ? -1 / (2 * d) : 1 / (2 * (4 - d));
  if (!(d > 0)) return { lower: 0, upper: 1 };
  if (!(d < 4)) return { lower: 1, upper: 0 };
  const K = generator(d, Q, joined, degree);
  const saddle = saddlePoint((s) => K(s, 0).re - Math.log(Math.abs(s)), bound);
  const tail = Math.min(1, Math.max(0, contour(K, saddle.at, saddle.scale)));
  return below ? { lower: tail, upper: 1 - tail } : { lower: 1 - tail, upper: tail };
}

/** E u'MAMu = tr A − tr Q'AQ. */
function expected(Q: Matrix, joined: Uint8Array, degree: Float64Array): number {
  const T = Q.rows;
  let trace = degree.reduce((sum, x) => sum + x, 0);
  for (let j = 0; j < Q.columns; j++)
    for (let t = 1; t < T; t++) if (joined[t]) trace -= (Q.data[j * T + t]! - Q.data[j * T + t - 1]!) ** 2;
  return trace;
}

interface Complex {
  re: number;
  im: number;
}

/** The function s ↦ log E exp(sZ) at s = re + i·im, by a complex LDL' of B; principal logarithms suffice, Re B being positive. */
function generator(
  d: number,
  Q: Matrix,
  joined: Uint8Array,
  degree: Float64Array,
): (re: number, im: number) => Complex {
  const T = Q.rows;
  const k = Q.columns;
  const yr = new Float64Array(k);
  const yi = new Float64Array(k);
  const Cr = new Float64Array(k * k);
  const Ci = new Float64Array(k * k);
  return (re, im) => {
    const zr = 2 * re;
    const zi = 2 * im;
    Cr.fill(0);
    Ci.fill(0);
    let logR = 0;
    let logI = 0;
    let Dr = 1;
    let Di = 0;
    for (let t = 0; t < T; t++) {
      const b = degree[t]! - d;
      let br = 1 - zr * b;
      let bi = -zi * b;
      let lr = 0;
      let li = 0;
      if (t > 0 && joined[t]) {
        const size = Dr * Dr + Di * Di;
        lr = (zr * Dr + zi * Di) / size;
        li = (zi * Dr - zr * Di) / size;
        br -= lr * zr - li * zi;
        bi -= lr * zi + li * zr;
      }
      Dr = br;
      Di = bi;
      const size = Dr * Dr + Di * Di;
      logR += 0.5 * Math.log(size);
      logI += Math.atan2(Di, Dr);
      const vr = Dr / size;
      const vi = -Di / size;
      for (let i = 0; i < k; i++) {
        const r = Q.data[i * T + t]! - (lr * yr[i]! - li * yi[i]!);
        const m = -(lr * yi[i]! + li * yr[i]!);
        yr[i] = r;
        yi[i] = m;
      }
      for (let i = 0; i < k; i++) {
        const ar = yr[i]! * vr - yi[i]! * vi;
        const ai = yr[i]! * vi + yi[i]! * vr;
        for (let j = 0; j <= i; j++) {
          Cr[i * k + j]! += ar * yr[j]! - ai * yi[j]!;
          Ci[i * k + j]! += ar * yi[j]! + ai * yr[j]!;
        }
      }
    }
    for (let j = 0; j < k; j++) {
      const pr = Cr[j * k + j]!;
      const pi = Ci[j * k + j]!;
      const size = pr * pr + pi * pi;
      logR += 0.5 * Math.log(size);
      logI += Math.atan2(pi, pr);
      for (let i = j + 1; i < k; i++) {
        const fr = (Cr[i * k + j]! * pr + Ci[i * k + j]! * pi) / size;
        const fi = (Ci[i * k + j]! * pr - Cr[i * k + j]! * pi) / size;
        for (let h = j + 1; h <= i; h++) {
          const cr = Cr[h * k + j]!;
          const ci = Ci[h * k + j]!;
          Cr[i * k + h]! -= fr * cr - fi * ci;
          Ci[i * k + h]! -= fr * ci + fi * cr;
        }
      }
    }
    return { re: -0.5 * logR, im: -0.5 * logI };
  };
}

/** Where the convex `f` is least between 0 and `bound` (golden section, coarse: any point will do), and its width there. */
function saddlePoint(f: (s: number) => number, bound: number): { at: number; scale: number } {
  const golden = (Math.sqrt(5) - 1) / 2;
  let low = 1e-9;
  let high = 0.999;
  let a = high - golden * (high - low);
  let b = low + golden * (high - low);
  let fa = f(a * bound);
  let fb = f(b * bound);
  while (high - low > 0.02 * low) {
    if (fa < fb) {
      high = b;
      b = a;
      fb = fa;
      a = high - golden * (high - low);
      fa = f(a * bound);
    } else {
      low = a;
      a = b;
      fa = fb;
      b = low + golden * (high - low);
      fb = f(b * bound);
    }
  }
  const at = ((low + high) / 2) * bound;
  const step = 0.02 * Math.min(Math.abs(at), Math.abs(bound - at));
  const bend = (f(at + step) - 2 * f(at) + f(at - step)) / step ** 2;
  const room = Math.min(Math.abs(at), Math.abs(bound - at));
  return { at, scale: bend > 0 ? Math.min(1 / Math.sqrt(bend), room) : room };
}

/** (1/π) ∫₀^∞ Re exp(K(s))/|s| dy along s = at + iy, y = scale·sinh(v). */
function contour(K: (re: number, im: number) => Complex, at: number, scale: number): number {
  const step = 0.1;
  const term = (v: number) => {
    const y = scale * Math.sinh(v);
    const { re, im } = K(at, y);
    // 1/s for a right-hand line, −1/s for a left-hand one
    const sign = Math.sign(at);
    const size = at * at + y * y;
    const size0 = Math.exp(re) * scale * Math.cosh(v);
    return {
      value: (size0 * sign * (at * Math.cos(im) + y * Math.sin(im))) / size,
      size: size0 / Math.sqrt(size),
    };
  };
  let sum = term(0).value / 2;
  const largest = Math.abs(sum);
  for (let i = 1; i < 4000; i++) {
    const { value, size } = term(i * step);
    sum += value;
    if (size < 1e-17 * largest) break;
  }
  return (sum * step) / Math.PI;
}
