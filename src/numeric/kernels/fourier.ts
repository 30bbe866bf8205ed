// A transform of length n = n1·n2 as many short ones (Bailey's four steps): with t = n2·t1 + t2 and j = j1 + n1·j2, columns of
// length n1, a turn by e^(−2πi·t2·j1/n), rows of length n2. Eight short transforms run side by side in the lanes: the batch at
// `work` holds for each position eight real parts and then eight imaginary parts.

// @ts-ignore: decorator
@inline
const POSITION: usize = 128;

/**
 * The transform of `re`, `im` (overwritten), to `outRe`, `outIm`. n1, n2 are powers of two, at least 8. `factors1` and `factors2`
 * hold the factors of the short transforms, as `passes` reads them; `coarse` and `fine` cosine and sine of 2π·1024^½-steps: see turn.
 */
export function fourier(
  re: usize,
  im: usize,
  outRe: usize,
  outIm: usize,
  n1: i32,
  n2: i32,
  factors1: usize,
  factors2: usize,
  coarse: usize,
  fine: usize,
  shift: i32,
  work: usize,
): void {
  const rowBytes = (<usize>n2) << 3;
  const columnBytes = (<usize>n1) << 3;
  for (let t2: i32 = 0; t2 < n2; t2 += 8) {
    const offset = (<usize>t2) << 3;
    let from = offset;
    let to = work;
    for (let t1: i32 = 0; t1 < n1; t1++, from += rowBytes, to += POSITION) copyEight(re + from, im + from, to, to + 64);
    passes(work, n1, factors1);
    let reversed: i32 = 0;
    from = offset;
    for (let j1: i32 = 0; j1 < n1; j1++, from += rowBytes) {
      const at = work + <usize>reversed * POSITION;
      turn(at, j1, t2, coarse, fine, shift);
      copyEight(at, at + 64, re + from, im + from);
      reversed = nextReversed(reversed, n1);
    }
  }
  for (let j1: i32 = 0; j1 < n1; j1 += 8) {
    gatherRows(re + <usize>j1 * rowBytes, rowBytes, n2, work);
    gatherRows(im + <usize>j1 * rowBytes, rowBytes, n2, work + 64);
    passes(work, n2, factors2);
    let reversed: i32 = 0;
    let to = (<usize>j1) << 3;
    for (let j2: i32 = 0; j2 < n2; j2++, to += columnBytes) {
      const at = work + <usize>reversed * POSITION;
      copyEight(at, at + 64, outRe + to, outIm + to);
      reversed = nextReversed(reversed, n2);
    }
  }
}

/** The number after this one in the order of reversed bits. */
// @ts-ignore: decorator
@inline
function nextReversed(reversed: i32, n: i32): i32 {
  let bit = n >> 1;
  for (; reversed & bit; bit >>= 1) reversed ^= bit;
  return reversed | bit;
}

// @ts-ignore: decorator
@inline
function copyEight(re: usize, im: usize, toRe: usize, toIm: usize): void {
  v128.store(toRe, v128.load(re));
  v128.store(toRe, v128.load(re, 16), 16);
  v128.store(toRe, v128.load(re, 32), 32);
  v128.store(toRe, v128.load(re, 48), 48);
  v128.store(toIm, v128.load(im));
  v128.store(toIm, v128.load(im, 16), 16);
  v128.store(toIm, v128.load(im, 32), 32);
  v128.store(toIm, v128.load(im, 48), 48);
}

/** Eight rows side by side. */
function gatherRows(rows: usize, rowBytes: usize, n: i32, to: usize): void {
  for (let pair: usize = 0; pair < 4; pair++, rows += rowBytes << 1, to += 16) {
    let first = rows;
    let second = rows + rowBytes;
    let at = to;
    for (let t: i32 = 0; t < n; t += 2, first += 16, second += 16, at += POSITION << 1) {
      const a = v128.load(first);
      const b = v128.load(second);
      v128.store(at, i64x2.shuffle(a, b, 0, 2));
      v128.store(at + POSITION, i64x2.shuffle(a, b, 1, 3));
    }
  }
}

/**
 * Turns position j1 of columns t2..t2+7 by e^(−2πi·t2·j1/n), each as the product of one factor of two short tables: number p is
 * (p >> shift) in `coarse` and the rest in `fine`, cosine and sine by turns.
 */
function turn(at: usize, j1: i32, t2: i32, coarse: usize, fine: usize, shift: i32): void {
  const mask = (1 << shift) - 1;
  let p = j1 * t2;
  for (let lane: usize = 0; lane < 64; lane += 16) {
    const a = coarse + ((<usize>(p >> shift)) << 4);
    const b = fine + ((<usize>(p & mask)) << 4);
    p += j1;
    const c = coarse + ((<usize>(p >> shift)) << 4);
    const d = fine + ((<usize>(p & mask)) << 4);
    p += j1;
    const first = v128.load(a);
    const second = v128.load(c);
    const third = v128.load(b);
    const fourth = v128.load(d);
    const coarseCos = i64x2.shuffle(first, second, 0, 2);
    const coarseSin = i64x2.shuffle(first, second, 1, 3);
    const fineCos = i64x2.shuffle(third, fourth, 0, 2);
    const fineSin = i64x2.shuffle(third, fourth, 1, 3);
    const cos = f64x2.sub(f64x2.mul(coarseCos, fineCos), f64x2.mul(coarseSin, fineSin));
    const sin = f64x2.add(f64x2.mul(coarseSin, fineCos), f64x2.mul(coarseCos, fineSin));
    const x = v128.load(at + lane);
    const y = v128.load(at + lane, 64);
    v128.store(at + lane, f64x2.add(f64x2.mul(x, cos), f64x2.mul(y, sin)));
    v128.store(at + lane, f64x2.sub(f64x2.mul(y, cos), f64x2.mul(x, sin)), 64);
  }
}

/**
 * Eight transforms of length n in place, radix four, results in the order of reversed bits. `factors` holds for each m below n/4
 * cosine and sine of 2πm/n, twice and three times that, and after them the same for n/4 and so on.
 */
function passes(x: usize, n: i32, factors: usize): void {
  if (n < 4) {
    if (n === 2) pairs(x);
    return;
  }
  const quarter = n >> 2;
  const step = <usize>quarter * POSITION;
  let a = x;
  let f = factors;
  for (let m: i32 = 0; m < quarter; m++, a += POSITION, f += 48) {
    const c1 = v128.load64_splat(f);
    const s1 = v128.load64_splat(f, 8);
    const c2 = v128.load64_splat(f, 16);
    const s2 = v128.load64_splat(f, 24);
    const c3 = v128.load64_splat(f, 32);
    const s3 = v128.load64_splat(f, 40);
    for (let lane: usize = 0; lane < 64; lane += 16) {
      const p = a + lane;
      const q = p + step;
      const r = q + step;
      const s = r + step;
      const ar = v128.load(p);
      const ai = v128.load(p, 64);
      const br = v128.load(q);
      const bi = v128.load(q, 64);
      const cr = v128.load(r);
      const ci = v128.load(r, 64);
      const dr = v128.load(s);
      const di = v128.load(s, 64);
      const evenR = f64x2.add(ar, cr);
      const evenI = f64x2.add(ai, ci);
      const oddR = f64x2.sub(ar, cr);
      const oddI = f64x2.sub(ai, ci);
      const sumR = f64x2.add(br, dr);
      const sumI = f64x2.add(bi, di);
      const restR = f64x2.sub(br, dr);
      const restI = f64x2.sub(bi, di);
      v128.store(p, f64x2.add(evenR, sumR));
      v128.store(p, f64x2.add(evenI, sumI), 64);
      const zr = f64x2.sub(evenR, sumR);
      const zi = f64x2.sub(evenI, sumI);
      v128.store(q, f64x2.add(f64x2.mul(zr, c2), f64x2.mul(zi, s2)));
      v128.store(q, f64x2.sub(f64x2.mul(zi, c2), f64x2.mul(zr, s2)), 64);
      const yr = f64x2.add(oddR, restI);
      const yi = f64x2.sub(oddI, restR);
      v128.store(r, f64x2.add(f64x2.mul(yr, c1), f64x2.mul(yi, s1)));
      v128.store(r, f64x2.sub(f64x2.mul(yi, c1), f64x2.mul(yr, s1)), 64);
      const wr = f64x2.sub(oddR, restI);
      const wi = f64x2.add(oddI, restR);
      v128.store(s, f64x2.add(f64x2.mul(wr, c3), f64x2.mul(wi, s3)));
      v128.store(s, f64x2.sub(f64x2.mul(wi, c3), f64x2.mul(wr, s3)), 64);
    }
  }
  // One quarter after the other, so that short ones stay in the cache.
  const next = factors + <usize>quarter * 48;
  passes(x, quarter, next);
  passes(x + step, quarter, next);
  passes(x + 2 * step, quarter, next);
  passes(x + 3 * step, quarter, next);
}

function pairs(x: usize): void {
  for (let at = x; at < x + POSITION; at += 16) {
    const a = v128.load(at);
    const b = v128.load(at, <usize>128);
    v128.store(at, f64x2.add(a, b));
    v128.store(at, f64x2.sub(a, b), <usize>128);
  }
}
