import type { Regression } from "../../estimate/index.js";
import { basisColumns, residualised } from "../parts/projection.js";
import { columnLength, scaledColumns } from "./recursion.js";

/** The search for one break: everything that depends on the terms and the dates, not on the outcome. */
export interface BreakSearch {
  /** Rows before the break, ascending. */
  readonly dates: Int32Array;
  /** Number of breaking coefficients. */
  readonly q: number;
  /** Drop in the residual sum of squares that a break after each date brings, for residuals e orthogonal to the terms. */
  reductions(e: Float64Array): Float64Array;
}

/**
 * Prepares the regressions of residuals on the breaking terms times a step, for every date: with B an orthonormal basis of the
 * breaking terms and Q of all, the step's columns have cross products A − C'C, A = Σ b b', C = Σ q b' over the rows after the
 * date. Each is factored once, so that another outcome costs O(T q + dates·q²). Dates at which it is singular are left out.
 */
export function breakSearch(
  m: Regression,
  breaking: readonly number[],
  dates: readonly number[],
): BreakSearch {
  const { T, k } = m;
  const q = breaking.length;
  const Q = basisColumns(m.Q);
  const B = orthonormal(breaking.map((j) => scaledColumns(m)[j]!));
  const A = new Float64Array(q * q);
  const C = new Float64Array(k * q);
  const factors = new Map<number, Float64Array>();
  const wanted = new Set(dates);
  for (let t = T - 1; t > 0; t--) {
    for (let i = 0; i < q; i++) {
      const b = B[i]![t]!;
      for (let j = 0; j <= i; j++) A[i * q + j]! += b * B[j]![t]!;
      for (let h = 0; h < k; h++) C[h * q + i]! += b * Q[h]![t]!;
    }
    if (!wanted.has(t)) continue;
    const factor = factored(A, C, q, k);
    if (factor) factors.set(t, factor);
  }
  const kept = Int32Array.from([...factors.keys()].sort((a, b) => a - b));
  return {
    dates: kept,
    q,
    reductions(e) {
      const g = new Float64Array(q);
      const z = new Float64Array(q);
      const result = new Float64Array(kept.length);
      let t = T - 1;
      for (let at = kept.length - 1; at >= 0; at--) {
        for (; t >= kept[at]!; t--) for (let i = 0; i < q; i++) g[i]! += B[i]![t]! * e[t]!;
        const L = factors.get(kept[at]!)!;
        let sum = 0;
        for (let i = 0; i < q; i++) {
          let value = g[i]!;
          for (let j = 0; j < i; j++) value -= L[i * q + j]! * z[j]!;
          z[i] = value / L[i * q + i]!;
          sum += z[i]! ** 2;
        }
        result[at] = sum;
      }
      return result;
    },
  };
}

/** Lower triangle of A − C'C, or nothing where it is singular. */
function factored(A: Float64Array, C: Float64Array, q: number, k: number): Float64Array | undefined {
  const L = new Float64Array(q * q);
  for (let i = 0; i < q; i++) {
    for (let j = 0; j <= i; j++) {
      let value = A[i * q + j]!;
      for (let h = 0; h < k; h++) value -= C[h * q + i]! * C[h * q + j]!;
      for (let h = 0; h < j; h++) value -= L[i * q + h]! * L[j * q + h]!;
      if (i !== j) L[i * q + j] = value / L[j * q + j]!;
      else if (value > 1e-10 * A[i * q + i]!) L[i * q + i] = Math.sqrt(value);
      else return undefined;
    }
  }
  return L;
}

function orthonormal(columns: readonly Float64Array[]): Float64Array[] {
  const basis: Float64Array[] = [];
  for (const column of columns) {
    const rest = residualised(column, basis);
    const length = columnLength(rest);
    basis.push(rest.map((x) => x / length));
  }
  return basis;
}
