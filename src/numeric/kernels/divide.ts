/**
 * X ← X R⁻¹ for k columns of X, `stride` bytes apart, and an upper triangle R (k×k, column-major) with the reciprocals of its
 * diagonal in place of the diagonal. Columns are taken off in their order.
 */
export function divideByTriangle(x: usize, stride: usize, k: i32, rows: i32, r: usize): void {
  const end = (<usize>rows) << 3;
  for (let j: i32 = 0; j < k; j++) {
    const target = x + <usize>j * stride;
    const weights = r + ((<usize>(j * k)) << 3);
    const scale = v128.load64_splat(weights + ((<usize>j) << 3));
    for (let at: usize = 0; at < end; at += 32) {
      let a = v128.load(target + at);
      let b = v128.load(target + at, 16);
      let source = x + at;
      let w = weights;
      for (let i: i32 = 0; i < j; i++, source += stride, w += 8) {
        const weight = v128.load64_splat(w);
        a = f64x2.sub(a, f64x2.mul(weight, v128.load(source)));
        b = f64x2.sub(b, f64x2.mul(weight, v128.load(source, 16)));
      }
      v128.store(target + at, f64x2.mul(a, scale));
      v128.store(target + at, f64x2.mul(b, scale), 16);
    }
  }
}
