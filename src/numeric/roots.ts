/** A root of f between a and b, where f changes sign; Brent (1973). `tolerance` is absolute in x. */
export function brentRoot(f: (x: number) => number, a: number, b: number, tolerance = 1e-12): number {
  let fa = f(a);
  let fb = f(b);
  if (fa === 0) return a;
  if (fb === 0) return b;
  if (fa > 0 === fb > 0) throw new RangeError("brentRoot: the function has the same sign at both ends");
  let c = a;
  let fc = fa;
  let step = b - a;
  let before = step;
  for (let iteration = 0; iteration < 200; iteration++) {
    if (Math.abs(fc) < Math.abs(fb)) {
      [a, b, c] = [b, c, b];
      [fa, fb, fc] = [fb, fc, fb];
    }
    const width = 2 * Number.EPSILON * Math.abs(b) + tolerance / 2;
    const middle = (c - b) / 2;
    if (Math.abs(middle) <= width || fb === 0) return b;
    if (Math.abs(before) >= width && Math.abs(fa) > Math.abs(fb)) {
      let p: number;
      let q: number;
      const s = fb / fa;
      if (a === c) {
        p = 2 * middle * s;
        q = 1 - s;
      } else {
        const r = fb / fc;
        const u = fa / fc;
        p = s * (2 * middle * u * (u - r) - (b - a) * (r - 1));
        q = (u - 1) * (r - 1) * (s - 1);
      }
      if (p > 0) q = -q;
      else p = -p;
      if (2 * p < Math.min(3 * middle * q - Math.abs(width * q), Math.abs(before * q))) {
        before = step;
        step = p / q;
      } else {
        step = middle;
        before = middle;
      }
    } else {
      step = middle;
      before = middle;
    }
    a = b;
    fa = fb;
    b += Math.abs(step) > width ? step : middle > 0 ? width : -width;
    fb = f(b);
    if (fb > 0 === fc > 0) {
      c = a;
      fc = fa;
      step = b - a;
      before = step;
    }
  }
  return b;
}
