/*
 * The numeric kernels in plain TypeScript, each sum in the order of its WebAssembly twin: the two agree to the bit.
 */

/** Four interleaved sums, as the kernels add. */
export function dotPlain(a: ArrayLike<number>, b: ArrayLike<number>, from = 0, to = a.length): number {
  const s = [0, 0, 0, 0];
  for (let t = from; t < to; t++) s[(t - from) % 4]! += a[t]! * b[t]!;
  return s[0]! + s[2]! + (s[1]! + s[3]!);
}

/** R (m×m, column-major) of the columns, Householder reflections over blocks of 256 rows. */
export function tallRPlain(columns: readonly Float64Array[]): Float64Array {
  const m = columns.length;
  const T = columns[0]!.length;
  const r = new Float64Array(m * m);
  for (let start = 0; start < T; start += 256) {
    const block = columns.map((column) => column.slice(start, start + 256));
    for (let j = 0; j < m; j++) {
      const v = block[j]!;
      const sum = dotPlain(v, v);
      if (sum === 0) continue;
      const pivot = r[j * m + j]!;
      const norm = Math.sqrt(pivot * pivot + sum);
      const alpha = pivot > 0 ? -norm : norm;
      const head = pivot - alpha;
      const factor = 1 / (alpha * head);
      r[j * m + j] = alpha;
      for (let l = j + 1; l < m; l++) {
        const other = block[l]!;
        const weight = (head * r[l * m + j]! + dotPlain(v, other)) * factor;
        r[l * m + j]! += weight * head;
        for (let t = 0; t < v.length; t++) other[t]! += weight * v[t]!;
      }
    }
  }
  return r;
}

/** X R⁻¹ column after column, in place. */
export function divideByTrianglePlain(columns: readonly Float64Array[], r: Float64Array): void {
  const k = columns.length;
  columns.forEach((target, j) => {
    const scale = 1 / r[j * k + j]!;
    for (let t = 0; t < target.length; t++) {
      for (let i = 0; i < j; i++) target[t]! -= r[j * k + i]! * columns[i]![t]!;
      target[t]! *= scale;
    }
  });
}

const upper = (a: number): number => {
  const c = 134217729 * a;
  return c - (c - a);
};

/** a·b and what rounding lost of it (Dekker 1971). */
export function twoProduct(a: number, b: number): [number, number] {
  const p = a * b;
  const ah = upper(a);
  const al = a - ah;
  const bh = upper(b);
  const bl = b - bh;
  return [p, al * bl - (p - ah * bh - al * bh - ah * bl)];
}

/** a + b and what rounding lost of it (Knuth 1969). */
export function twoSum(a: number, b: number): [number, number] {
  const sum = a + b;
  const part = sum - a;
  return [sum, a - (sum - part) + (b - part)];
}

/** y − X(high + low) as pairs. */
export function residualPairsPlain(
  columns: readonly Float64Array[],
  y: Float64Array,
  beta: { readonly high: Float64Array; readonly low: Float64Array },
): { high: Float64Array; low: Float64Array } {
  const high = new Float64Array(y.length);
  const low = new Float64Array(y.length);
  for (let t = 0; t < y.length; t++) {
    let sum = y[t]!;
    let tail = 0;
    columns.forEach((column, j) => {
      const a = column[t]!;
      const [p, lost] = twoProduct(a, -beta.high[j]!);
      const [next, dropped] = twoSum(sum, p);
      tail += dropped + lost + a * -beta.low[j]!;
      sum = next;
    });
    high[t] = sum + tail;
    low[t] = tail - (high[t]! - sum);
  }
  return { high, low };
}

/** X'(high + low), four sums a column with their tails, added without loss. */
export function gradientPlain(
  columns: readonly Float64Array[],
  { high, low }: { readonly high: Float64Array; readonly low: Float64Array },
): Float64Array {
  return Float64Array.from(columns, (column) => {
    const sums = [0, 0, 0, 0];
    const tails = [0, 0, 0, 0];
    for (let t = 0; t < column.length; t++) {
      const [p, lost] = twoProduct(column[t]!, high[t]!);
      const [next, dropped] = twoSum(sums[t % 4]!, p);
      tails[t % 4]! += dropped + lost + column[t]! * low[t]!;
      sums[t % 4] = next;
    }
    let sum = 0;
    let tail = 0;
    for (const i of [0, 2, 1, 3]) {
      const [next, dropped] = twoSum(sum, sums[i]!);
      tail += dropped + tails[i]!;
      sum = next;
    }
    return sum + tail;
  });
}

/** The scores of each column over the calendar. */
const scores = (columns: readonly Float64Array[], u: Float64Array): Float64Array[] =>
  columns.map((column) => column.map((value, t) => value * u[t]!));

/** m⁻¹ Σ_s W_s W_s' of the sums of m neighbouring scores, in blocks of 512 windows; no renewal of the running sums. */
export function movingSumProductsPlain(
  columns: readonly Float64Array[],
  u: Float64Array,
  m: number,
): Float64Array {
  const n = u.length;
  const total = n + m - 1;
  const windows = scores(columns, u).map((v) => {
    let sum = 0;
    return Float64Array.from({ length: total }, (_, s) => (sum += (v[s] ?? 0) - (v[s - m] ?? 0)));
  });
  return products(windows, windows, total, 512).map((value) => value / m);
}

/** Σ_j w_j Γ_j over |j| ≤ L by filtering with half the weights, in blocks of `size` rows. */
export function laggedProductsPlain(
  columns: readonly Float64Array[],
  u: Float64Array,
  weights: Float64Array,
  size: number,
): Float64Array {
  const k = columns.length;
  const n = u.length;
  const v = scores(columns, u);
  const filtered = v.map((series) =>
    Float64Array.from({ length: n }, (_, t) => {
      let sum = 0;
      for (let j = 0; j < weights.length; j++) {
        sum += (j === 0 ? weights[0]! / 2 : weights[j]!) * (series[t - j] ?? 0);
      }
      return sum;
    }),
  );
  const half = products(v, filtered, n, size);
  return half.map((value, i) => value + half[(i % k) * k + Math.floor(i / k)]!);
}

function products(
  a: readonly Float64Array[],
  b: readonly Float64Array[],
  n: number,
  size: number,
): Float64Array {
  const k = a.length;
  const result = new Float64Array(k * k);
  for (let from = 0; from < n; from += size) {
    for (let j = 0; j < k; j++) {
      for (let i = 0; i < k; i++)
        result[j * k + i]! += dotPlain(a[i]!, b[j]!, from, Math.min(n, from + size));
    }
  }
  return result;
}
