import { dot, dotFour } from "./dots";

/**
 * Reflects a block of rows into the triangle R above it (Householder). R is m×m at `r`, column-major; column j of the
 * block lies at block + j·stride. `work` holds eight numbers.
 */
export function eliminate(r: usize, block: usize, stride: usize, m: i32, rows: i32, work: usize): void {
  const height = (<usize>m) << 3;
  for (let j: i32 = 0; j < m; j++) {
    const v = block + <usize>j * stride;
    const top = r + ((<usize>j) << 3);
    const pivotAt = top + <usize>j * height;
    const sum = dot(v, v, rows);
    if (sum == 0) continue;
    const pivot = f64.load(pivotAt);
    const norm = Math.sqrt(pivot * pivot + sum);
    const alpha = pivot > 0 ? -norm : norm;
    const head = pivot - alpha;
    const factor = 1 / (alpha * head);
    f64.store(pivotAt, alpha);
    let l = j + 1;
    for (; l + 4 <= m; l += 4) {
      const other = block + <usize>l * stride;
      dotFour(v, other, stride, rows, work);
      for (let c: i32 = 0; c < 4; c++) {
        const at = top + <usize>(l + c) * height;
        const weight = (head * f64.load(at) + f64.load(work + ((<usize>c) << 3))) * factor;
        f64.store(at, f64.load(at) + weight * head);
        f64.store(work + ((<usize>c) << 3), weight);
      }
      addFour(other, stride, v, rows, work);
    }
    for (; l < m; l++) {
      const other = block + <usize>l * stride;
      const at = top + <usize>l * height;
      const weight = (head * f64.load(at) + dot(v, other, rows)) * factor;
      f64.store(at, f64.load(at) + weight * head);
      addTimes(other, weight, v, rows);
    }
  }
}

function addTimes(x: usize, weight: f64, v: usize, rows: i32): void {
  const w = f64x2.splat(weight);
  const end = v + ((<usize>rows) << 3);
  for (; v < end; v += 32, x += 32) {
    v128.store(x, f64x2.add(v128.load(x), f64x2.mul(w, v128.load(v))));
    v128.store(x, f64x2.add(v128.load(x, 16), f64x2.mul(w, v128.load(v, 16))), 16);
  }
}

/** Adds v, times a weight of its own, to each of four columns. */
function addFour(x: usize, stride: usize, v: usize, rows: i32, weights: usize): void {
  const w0 = v128.load64_splat(weights);
  const w1 = v128.load64_splat(weights, 8);
  const w2 = v128.load64_splat(weights, 16);
  const w3 = v128.load64_splat(weights, 24);
  let x1 = x + stride;
  let x2 = x1 + stride;
  let x3 = x2 + stride;
  const end = v + ((<usize>rows) << 3);
  for (; v < end; v += 16, x += 16, x1 += 16, x2 += 16, x3 += 16) {
    const y = v128.load(v);
    v128.store(x, f64x2.add(v128.load(x), f64x2.mul(w0, y)));
    v128.store(x1, f64x2.add(v128.load(x1), f64x2.mul(w1, y)));
    v128.store(x2, f64x2.add(v128.load(x2), f64x2.mul(w2, y)));
    v128.store(x3, f64x2.add(v128.load(x3), f64x2.mul(w3, y)));
  }
}
