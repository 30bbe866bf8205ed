const golden = (3 - Math.sqrt(5)) / 2;

/** A minimum of f between a and b, without derivatives; Brent (1973). Returns the place and the value there. */
export function brentMinimum(
  f: (x: number) => number,
  a: number,
  b: number,
  tolerance = 1e-10,
): { x: number; value: number } {
  let x = a + golden * (b - a);
  let w = x;
  let v = x;
  let fx = f(x);
  let fw = fx;
  let fv = fx;
  let step = 0;
  let before = 0;
  for (let iteration = 0; iteration < 200; iteration++) {
    const middle = (a + b) / 2;
    const width = 1e-15 * Math.abs(x) + tolerance;
    if (Math.abs(x - middle) <= 2 * width - (b - a) / 2) break;
    let useGolden = true;
    if (Math.abs(before) > width) {
      const r = (x - w) * (fx - fv);
      let q = (x - v) * (fx - fw);
      let p = (x - v) * q - (x - w) * r;
      q = 2 * (q - r);
      if (q > 0) p = -p;
      else q = -q;
      const last = before;
      before = step;
      if (Math.abs(p) < Math.abs(0.5 * q * last) && p > q * (a - x) && p < q * (b - x)) {
        step = p / q;
        const u = x + step;
        if (u - a < 2 * width || b - u < 2 * width) step = x < middle ? width : -width;
        useGolden = false;
      }
    }
    if (useGolden) {
      before = x < middle ? b - x : a - x;
      step = golden * before;
    }
    const u = x + (Math.abs(step) >= width ? step : step > 0 ? width : -width);
    const fu = f(u);
    if (fu <= fx) {
      if (u < x) b = x;
      else a = x;
      [v, w, x] = [w, x, u];
      [fv, fw, fx] = [fw, fx, fu];
    } else {
      if (u < x) a = u;
      else b = u;
      if (fu <= fw || w === x) {
        [v, w] = [w, u];
        [fv, fw] = [fw, fu];
      } else if (fu <= fv || v === x || v === w) {
        v = u;
        fv = fu;
      }
    }
  }
  return { x, value: fx };
}
