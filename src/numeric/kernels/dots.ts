/** Both lanes of two partial sums, in the fixed order. */
// @ts-ignore: decorator
@inline
export function total(a: v128, b: v128): f64 {
  const s = f64x2.add(a, b);
  return f64x2.extract_lane(s, 0) + f64x2.extract_lane(s, 1);
}

/** a'b over n entries. */
export function dot(a: usize, b: usize, n: i32): f64 {
  let s = f64x2.splat(0);
  let t = f64x2.splat(0);
  const end = a + ((<usize>n) << 3);
  for (; a < end; a += 32, b += 32) {
    s = f64x2.add(s, f64x2.mul(v128.load(a), v128.load(b)));
    t = f64x2.add(t, f64x2.mul(v128.load(a, 16), v128.load(b, 16)));
  }
  return total(s, t);
}

/** a'b for four columns b that lie `stride` bytes apart, to `out`. Each in the order of `dot`. */
export function dotFour(a: usize, b: usize, stride: usize, n: i32, out: usize): void {
  let s0 = f64x2.splat(0);
  let t0 = f64x2.splat(0);
  let s1 = f64x2.splat(0);
  let t1 = f64x2.splat(0);
  let s2 = f64x2.splat(0);
  let t2 = f64x2.splat(0);
  let s3 = f64x2.splat(0);
  let t3 = f64x2.splat(0);
  let b1 = b + stride;
  let b2 = b1 + stride;
  let b3 = b2 + stride;
  const end = a + ((<usize>n) << 3);
  for (; a < end; a += 32, b += 32, b1 += 32, b2 += 32, b3 += 32) {
    const x = v128.load(a);
    const y = v128.load(a, 16);
    s0 = f64x2.add(s0, f64x2.mul(x, v128.load(b)));
    t0 = f64x2.add(t0, f64x2.mul(y, v128.load(b, 16)));
    s1 = f64x2.add(s1, f64x2.mul(x, v128.load(b1)));
    t1 = f64x2.add(t1, f64x2.mul(y, v128.load(b1, 16)));
    s2 = f64x2.add(s2, f64x2.mul(x, v128.load(b2)));
    t2 = f64x2.add(t2, f64x2.mul(y, v128.load(b2, 16)));
    s3 = f64x2.add(s3, f64x2.mul(x, v128.load(b3)));
    t3 = f64x2.add(t3, f64x2.mul(y, v128.load(b3, 16)));
  }
  f64.store(out, total(s0, t0));
  f64.store(out, total(s1, t1), 8);
  f64.store(out, total(s2, t2), 16);
  f64.store(out, total(s3, t3), 24);
}
