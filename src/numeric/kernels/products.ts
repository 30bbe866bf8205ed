import { dot, dotFour } from "./dots";

/** x_t ← x_t u_t for k columns that lie `stride` bytes apart: rows of X to scores. */
export function multiplyRows(x: usize, stride: usize, k: i32, rows: i32, u: usize): void {
  const end = (<usize>rows) << 3;
  for (let j: i32 = 0; j < k; j++, x += stride) {
    for (let at: usize = 0; at < end; at += 32) {
      v128.store(x + at, f64x2.mul(v128.load(x + at), v128.load(u + at)));
      v128.store(x + at, f64x2.mul(v128.load(x + at, 16), v128.load(u + at, 16)), 16);
    }
  }
}

/**
 * The sums of neighbouring rows as a window moves on: running ← running + entering_t − leaving_t for every row, written over
 * `entering`. One running sum a column.
 */
export function movingSums(entering: usize, leaving: usize, stride: usize, k: i32, rows: i32, running: usize): void {
  const end = (<usize>rows) << 3;
  let j: i32 = 0;
  for (; j + 4 <= k; j += 4) {
    let s0 = f64.load(running);
    let s1 = f64.load(running, 8);
    let s2 = f64.load(running, 16);
    let s3 = f64.load(running, 24);
    const e1 = entering + stride;
    const e2 = e1 + stride;
    const e3 = e2 + stride;
    const l1 = leaving + stride;
    const l2 = l1 + stride;
    const l3 = l2 + stride;
    for (let at: usize = 0; at < end; at += 8) {
      s0 += f64.load(entering + at) - f64.load(leaving + at);
      s1 += f64.load(e1 + at) - f64.load(l1 + at);
      s2 += f64.load(e2 + at) - f64.load(l2 + at);
      s3 += f64.load(e3 + at) - f64.load(l3 + at);
      f64.store(entering + at, s0);
      f64.store(e1 + at, s1);
      f64.store(e2 + at, s2);
      f64.store(e3 + at, s3);
    }
    f64.store(running, s0);
    f64.store(running, s1, 8);
    f64.store(running, s2, 16);
    f64.store(running, s3, 24);
    running += 32;
    entering += stride << 2;
    leaving += stride << 2;
  }
  for (; j < k; j++) {
    let sum = f64.load(running);
    for (let at: usize = 0; at < end; at += 8) {
      sum += f64.load(entering + at) - f64.load(leaving + at);
      f64.store(entering + at, sum);
    }
    f64.store(running, sum);
    running += 8;
    entering += stride;
    leaving += stride;
  }
}

/**
 * Adds A'B to `result`, a k×k matrix (column-major), for A and B of k columns each, `strideA` and `strideB` bytes apart.
 * With `upper` only entries on and above the diagonal. `work` holds four numbers.
 */
export function addProducts(
  a: usize,
  strideA: usize,
  b: usize,
  strideB: usize,
  k: i32,
  rows: i32,
  upper: bool,
  result: usize,
  work: usize,
): void {
  for (let j: i32 = 0; j < k; j++, b += strideB) {
    const n = upper ? j + 1 : k;
    let out = result + ((<usize>(j * k)) << 3);
    let column = a;
    let i: i32 = 0;
    for (; i + 4 <= n; i += 4, column += strideA << 2, out += 32) {
      dotFour(b, column, strideA, rows, work);
      for (let c: usize = 0; c < 32; c += 8) f64.store(out + c, f64.load(out + c) + f64.load(work + c));
    }
    for (; i < n; i++, column += strideA, out += 8) f64.store(out, f64.load(out) + dot(b, column, rows));
  }
}
