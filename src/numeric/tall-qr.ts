import { type Matrix, matrix } from "./matrix.js";

const blockRows = 256;

/**
 * Upper triangular R (m×m) of a QR decomposition of a tall matrix given by its columns, T rows: Householder
 * reflections over blocks of rows that fit the cache, each block stacked under the R of those before it.
 * `scales` multiplies each column (powers of two keep this exact). Cost 2 T m². The diagonal may be of either sign.
 */
export function tallR(columns: readonly Float64Array[], scales: Float64Array): Matrix {
  const m = columns.length;
  const T = columns[0]!.length;
  const height = m + blockRows;
  const work = new Float64Array(height * m);
  for (let start = 0; start < T; start += blockRows) {
    const rows = Math.min(blockRows, T - start);
    for (let j = 0; j < m; j++) {
      const source = columns[j]!;
      const scale = scales[j]!;
      const base = j * height + m;
      for (let i = 0; i < rows; i++) work[base + i] = source[start + i]! * scale;
    }
    eliminateBlock(work, height, m, rows);
  }
  const r = matrix(m, m);
  for (let j = 0; j < m; j++) for (let i = 0; i <= j; i++) r.data[j * m + i] = work[j * height + i]!;
  return r;
}

/** Reflects the block below the triangle into it: column j has its pivot at row j, its block from row m on. */
function eliminateBlock(work: Float64Array, height: number, m: number, rows: number): void {
  for (let j = 0; j < m; j++) {
    const pivotAt = j * height + j;
    const from = j * height + m;
    let sum = 0;
    for (let i = 0; i < rows; i++) sum += work[from + i]! * work[from + i]!;
    if (sum === 0) continue;
    const pivot = work[pivotAt]!;
    const norm = Math.sqrt(pivot * pivot + sum);
    const alpha = pivot > 0 ? -norm : norm;
    const head = pivot - alpha;
    const factor = 1 / (alpha * head); // negative: −1 / (½ v'v)
    work[pivotAt] = alpha;
    for (let l = j + 1; l < m; l++) {
      const other = l * height + m;
      let inner = head * work[l * height + j]!;
      for (let i = 0; i < rows; i++) inner += work[from + i]! * work[other + i]!;
      inner *= factor;
      work[l * height + j]! += inner * head;
      for (let i = 0; i < rows; i++) work[other + i]! += inner * work[from + i]!;
    }
  }
}
