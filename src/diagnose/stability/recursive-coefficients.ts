import type { Regression } from "../../estimate/index.js";
import { columnOf, normal, studentT } from "../../numeric/index.js";
import { columnLength, recursion } from "./recursion.js";

/** A coefficient as it was estimated from the rows up to one of them. */
export interface RecursivePoint {
  readonly row: number;
  readonly period: number;
  readonly estimate: number;
  /** Classical interval at the level asked for. */
  readonly low: number;
  readonly high: number;
}

/** The path of one coefficient. */
export interface RecursivePath {
  readonly term: string;
  readonly points: readonly RecursivePoint[];
}

/**
 * Every coefficient from the first n rows, n growing: from where all terms are determined and a tenth of the sample, but at
 * least 2k rows, is in, at most `points` times. Bands are classical, with t(n − k): they are for looking at, not for testing.
 */
export function recursiveCoefficients(m: Regression, level: number, points = 150): RecursivePath[] {
  const { T, k } = m;
  const start = Math.max(2 * k, Math.ceil(T / 10));
  const every = Math.max(1, Math.ceil((T - start) / points));
  const lengths = Array.from({ length: k }, (_, j) => columnLength(columnOf(m.X, j)));
  const paths = m.terms.map((term) => ({ term, points: [] as RecursivePoint[] }));
  recursion(m, m.y, 0, T - 1, (row, R, rhs, rss, rank) => {
    const n = row + 1;
    if (rank < k || n <= k || n < start || ((T - n) % every !== 0 && n !== T)) return;
    const { solution, variances } = solve(R, rhs, k);
    const s = Math.sqrt(rss / (n - k));
    const t = studentPoint((1 - level) / 2, n - k);
    for (let j = 0; j < k; j++) {
      const estimate = solution[j]! / lengths[j]!;
      const half = (t * s * Math.sqrt(variances[j]!)) / lengths[j]!;
      paths[j]!.points.push({
        row,
        period: m.periods[row]!,
        estimate,
        low: estimate - half,
        high: estimate + half,
      });
    }
  });
  return paths;
}

/** Upper t quantile: exact up to 30 degrees of freedom, beyond by the expansion in 1/df (Cornish and Fisher), six digits. */
function studentPoint(p: number, df: number): number {
  if (df <= 30) return studentT.upperQuantile(p, df);
  const z = normal.upperQuantile(p);
  const z2 = z * z;
  return (
    z *
    (1 +
      (z2 + 1) / (4 * df) +
      ((5 * z2 + 16) * z2 + 3) / (96 * df * df) +
      (((3 * z2 + 19) * z2 + 17) * z2 - 15) / (384 * df ** 3))
  );
}

/** R⁻¹·rhs and the diagonal of (R'R)⁻¹ for an upper triangle, row-major. */
function solve(R: Float64Array, rhs: Float64Array, k: number) {
  const solution = new Float64Array(k);
  const variances = new Float64Array(k);
  for (let j = k - 1; j >= 0; j--) {
    let value = rhs[j]!;
    for (let h = j + 1; h < k; h++) value -= R[j * k + h]! * solution[h]!;
    solution[j] = value / R[j * k + j]!;
  }
  const inverse = new Float64Array(k);
  for (let c = 0; c < k; c++) {
    inverse.fill(0);
    for (let j = c; j >= 0; j--) {
      let value = j === c ? 1 : 0;
      for (let h = j + 1; h <= c; h++) value -= R[j * k + h]! * inverse[h]!;
      inverse[j] = value / R[j * k + j]!;
      variances[j]! += inverse[j]! ** 2;
    }
  }
  return { solution, variances };
}

/** The coefficients from rows `from` .. `to` alone; all NaN unless these determine every term that is not zero throughout. */
export function recursiveEnd(m: Regression, from: number, to: number): number[] {
  const { k } = m;
  const used = Array.from({ length: k }, (_, j) =>
    columnOf(m.X, j)
      .subarray(from, to + 1)
      .some((x) => x !== 0),
  );
  let result = new Array<number>(k).fill(Number.NaN);
  recursion(m, m.y, from, to, (row, R, rhs, _rss, rank) => {
    if (row !== to || rank < used.filter(Boolean).length) return;
    const at = used.flatMap((is, j) => (is ? [j] : []));
    const packed = Float64Array.from(at.flatMap((i) => at.map((j) => R[i * k + j]!)));
    const { solution } = solve(
      packed,
      Float64Array.from(at, (j) => rhs[j]!),
      at.length,
    );
    result = result.map((_, j) =>
      used[j] ? solution[at.indexOf(j)]! / columnLength(columnOf(m.X, j)) : Number.NaN,
    );
  });
  return result;
}
