import { type Matrix, matrix } from "../../numeric/index.js";
import { dot } from "../shape/vectors.js";
import { chirpTransforms } from "./chirp.js";
import { copyRows, type Series } from "./series.js";

/** Up to this many products n·ν the coefficients are summed as they stand. */
const DIRECT = 2_000_000;

/**
 * (n/ν) Σ_{j ≤ ν} Λ_j Λ_j' with Λ_j = √(2/n) Σ_t v_t cos(πj(t − ½)/n): the equal-weighted cosine estimate on the scale of a
 * sum over n periods.
 */
export function cosineSum(series: Series, nu: number, direct = DIRECT): Matrix {
  const { rows: n, columns: k } = series.columns;
  const coefficients = n * nu <= direct ? directly(series, nu) : byTransform(series, nu);
  const result = matrix(k, k);
  for (let j = 0; j < k; j++) {
    for (let i = 0; i <= j; i++) {
      result.data[j * k + i] = result.data[i * k + j] = (2 / nu) * dot(coefficients[i]!, coefficients[j]!);
    }
  }
  return result;
}

/** Σ_t v_t cos(πj(t − ½)/n) for j = 1..ν and every column, angles reduced in whole numbers. */
function directly(series: Series, nu: number): Float64Array[] {
  const { rows: n, columns: k } = series.columns;
  const table = Float64Array.from({ length: 4 * n }, (_, m) => Math.cos((Math.PI * m) / (2 * n)));
  const columns = columnsOf(series);
  const result = columns.map(() => new Float64Array(nu));
  const wave = new Float64Array(n);
  for (let j = 1; j <= nu; j++) {
    let angle = j;
    for (let t = 0; t < n; t++) {
      wave[t] = table[angle]!;
      angle += 2 * j;
      if (angle >= 4 * n) angle -= 4 * n;
    }
    for (let a = 0; a < k; a++) result[a]![j - 1] = dot(columns[a]!, wave);
  }
  return result;
}

/** The same from the transform at frequencies πj/n, turned by half a period. */
function byTransform(series: Series, nu: number): Float64Array[] {
  const n = series.columns.rows;
  const list = columnsOf(series);
  const { re, im } = chirpTransforms(list, 2 * n, nu);
  return re.map((real, a) =>
    Float64Array.from({ length: nu }, (_, i) => {
      const half = (Math.PI * (i + 1)) / (2 * n);
      return real[i + 1]! * Math.cos(half) + im[a]![i + 1]! * Math.sin(half);
    }),
  );
}

/** Copies of the columns, multiplied. */
function columnsOf(series: Series): Float64Array[] {
  const { rows: n, columns: k } = series.columns;
  return Array.from({ length: k }, (_, j) => {
    const column = new Float64Array(n);
    copyRows(series, j, 0, n, column, 0);
    return column;
  });
}
