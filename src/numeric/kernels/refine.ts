// Doubled precision without fused multiplication: Dekker's splitting and product, Knuth's sum.

// @ts-ignore: decorator
@inline
const SPLITTER: f64 = 134217729; // 2^27 + 1

/** The upper 26 bits of each lane. */
// @ts-ignore: decorator
@inline
function upper(a: v128): v128 {
  const c = f64x2.mul(f64x2.splat(SPLITTER), a);
  return f64x2.sub(c, f64x2.sub(c, a));
}

/** a·b − p for p the rounded product, a and b split. */
// @ts-ignore: decorator
@inline
function productError(p: v128, ah: v128, al: v128, bh: v128, bl: v128): v128 {
  let e = f64x2.sub(p, f64x2.mul(ah, bh));
  e = f64x2.sub(e, f64x2.mul(al, bh));
  e = f64x2.sub(e, f64x2.mul(ah, bl));
  return f64x2.sub(f64x2.mul(al, bl), e);
}

/** What a + b loses to rounding in `next`. */
// @ts-ignore: decorator
@inline
function sumError(a: v128, b: v128, next: v128): v128 {
  const part = f64x2.sub(next, a);
  return f64x2.add(f64x2.sub(a, f64x2.sub(next, part)), f64x2.sub(b, part));
}

/**
 * y − Xβ row by row in doubled precision, as pairs `high`, `low`. `beta` holds four numbers for each column: −β rounded, its upper
 * and lower halves, and −(the rest of β).
 */
export function residualPairs(
  x: usize,
  stride: usize,
  k: i32,
  rows: i32,
  y: usize,
  beta: usize,
  high: usize,
  low: usize,
): void {
  const end = (<usize>rows) << 3;
  const last = beta + ((<usize>k) << 5);
  for (let at: usize = 0; at < end; at += 32) {
    let sum = v128.load(y + at);
    let sum2 = v128.load(y + at, 16);
    let tail = f64x2.splat(0);
    let tail2 = f64x2.splat(0);
    let column = x + at;
    for (let b = beta; b < last; b += 32, column += stride) {
      const value = v128.load64_splat(b);
      const bh = v128.load64_splat(b, 8);
      const bl = v128.load64_splat(b, 16);
      const rest = v128.load64_splat(b, 24);
      const a = v128.load(column);
      const ah = upper(a);
      const p = f64x2.mul(a, value);
      const next = f64x2.add(sum, p);
      let e = f64x2.add(sumError(sum, p, next), productError(p, ah, f64x2.sub(a, ah), bh, bl));
      tail = f64x2.add(tail, f64x2.add(e, f64x2.mul(a, rest)));
      sum = next;
      const a2 = v128.load(column, 16);
      const ah2 = upper(a2);
      const p2 = f64x2.mul(a2, value);
      const next2 = f64x2.add(sum2, p2);
      e = f64x2.add(sumError(sum2, p2, next2), productError(p2, ah2, f64x2.sub(a2, ah2), bh, bl));
      tail2 = f64x2.add(tail2, f64x2.add(e, f64x2.mul(a2, rest)));
      sum2 = next2;
    }
    const whole = f64x2.add(sum, tail);
    const whole2 = f64x2.add(sum2, tail2);
    v128.store(high + at, whole);
    v128.store(high + at, whole2, 16);
    v128.store(low + at, f64x2.sub(tail, f64x2.sub(whole, sum)));
    v128.store(low + at, f64x2.sub(tail2, f64x2.sub(whole2, sum2)), 16);
  }
}

/**
 * Adds X'r in doubled precision to the four running sums and tails (eight numbers a column) at `sums`, r the pairs
 * `high`, `low`.
 */
export function gradient(
  x: usize,
  stride: usize,
  k: i32,
  rows: i32,
  high: usize,
  low: usize,
  sums: usize,
): void {
  const end = (<usize>rows) << 3;
  for (let j: i32 = 0; j < k; j++, x += stride, sums += 64) {
    let sum = v128.load(sums);
    let sum2 = v128.load(sums, 16);
    let tail = v128.load(sums, 32);
    let tail2 = v128.load(sums, 48);
    for (let at: usize = 0; at < end; at += 32) {
      const a = v128.load(x + at);
      const b = v128.load(high + at);
      const ah = upper(a);
      const bh = upper(b);
      const p = f64x2.mul(a, b);
      const next = f64x2.add(sum, p);
      let e = productError(p, ah, f64x2.sub(a, ah), bh, f64x2.sub(b, bh));
      e = f64x2.add(sumError(sum, p, next), e);
      tail = f64x2.add(tail, f64x2.add(e, f64x2.mul(a, v128.load(low + at))));
      sum = next;
      const a2 = v128.load(x + at, 16);
      const b2 = v128.load(high + at, 16);
      const ah2 = upper(a2);
      const bh2 = upper(b2);
      const p2 = f64x2.mul(a2, b2);
      const next2 = f64x2.add(sum2, p2);
      e = productError(p2, ah2, f64x2.sub(a2, ah2), bh2, f64x2.sub(b2, bh2));
      e = f64x2.add(sumError(sum2, p2, next2), e);
      tail2 = f64x2.add(tail2, f64x2.add(e, f64x2.mul(a2, v128.load(low + at, 16))));
      sum2 = next2;
    }
    v128.store(sums, sum);
    v128.store(sums, sum2, 16);
    v128.store(sums, tail, 32);
    v128.store(sums, tail2, 48);
  }
}

/** high ← high + (low − Xδ): the residuals after a small change δ of the coefficients. */
export function correctResiduals(
  x: usize,
  stride: usize,
  k: i32,
  rows: i32,
  change: usize,
  high: usize,
  low: usize,
): void {
  const end = (<usize>rows) << 3;
  const last = change + ((<usize>k) << 3);
  for (let at: usize = 0; at < end; at += 32) {
    let value = v128.load(low + at);
    let value2 = v128.load(low + at, 16);
    let column = x + at;
    for (let c = change; c < last; c += 8, column += stride) {
      const delta = v128.load64_splat(c);
      value = f64x2.sub(value, f64x2.mul(v128.load(column), delta));
      value2 = f64x2.sub(value2, f64x2.mul(v128.load(column, 16), delta));
    }
    v128.store(high + at, f64x2.add(v128.load(high + at), value));
    v128.store(high + at, f64x2.add(v128.load(high + at, 16), value2), 16);
  }
}
