/**
 * out_t = Σ_j w_j x_{t−j} for j = 0..last and k columns, `stride` bytes apart: `x` points at row 0, with at least `last` rows
 * before it. Lags are added in their order. Rows in eights.
 */
export function filter(
  x: usize,
  stride: usize,
  k: i32,
  rows: i32,
  weights: usize,
  last: i32,
  out: usize,
  outStride: usize,
): void {
  const end = (<usize>rows) << 3;
  for (let j: i32 = 0; j < k; j++, x += stride, out += outStride) {
    for (let at: usize = 0; at < end; at += 64) {
      let s0 = f64x2.splat(0);
      let s1 = f64x2.splat(0);
      let s2 = f64x2.splat(0);
      let s3 = f64x2.splat(0);
      let from = x + at;
      let w = weights;
      for (let lag: i32 = 0; lag <= last; lag++, from -= 8, w += 8) {
        const weight = v128.load64_splat(w);
        s0 = f64x2.add(s0, f64x2.mul(weight, v128.load(from)));
        s1 = f64x2.add(s1, f64x2.mul(weight, v128.load(from, 16)));
        s2 = f64x2.add(s2, f64x2.mul(weight, v128.load(from, 32)));
        s3 = f64x2.add(s3, f64x2.mul(weight, v128.load(from, 48)));
      }
      v128.store(out + at, s0);
      v128.store(out + at, s1, 16);
      v128.store(out + at, s2, 32);
      v128.store(out + at, s3, 48);
    }
  }
}
