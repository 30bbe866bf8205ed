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
  /** What is left of such residuals once the terms may break at the `at`-th of the dates. */
  withBreak(e: Float64Array, at: number): Float64Array;
  /** The same search over about `most` evenly spaced dates, the `keep`-th among them. */
  thinned(most: number, keep: number): BreakSearch;
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
  return over(Int32Array.from([...factors.keys()].sort((a, b) => a - b)), factors, B, Q);
}

function over(
  kept: Int32Array,
  factors: ReadonlyMap<number, Float64Array>,
  B: readonly Float64Array[],
  Q: readonly Float64Array[],
): BreakSearch {
  const q = B.length;
  const T = B[0]!.length;
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
    withBreak(e, at) {
      const date = kept[at]!;
      const L = factors.get(date)!;
      const delta = new Float64Array(q);
      for (let i = 0; i < q; i++) for (let t = date; t < T; t++) delta[i]! += B[i]![t]! * e[t]!;
      for (let i = 0; i < q; i++) {
        for (let j = 0; j < i; j++) delta[i]! -= L[i * q + j]! * delta[j]!;
        delta[i]! /= L[i * q + i]!;
      }
      for (let i = q - 1; i >= 0; i--) {
        for (let j = i + 1; j < q; j++) delta[i]! -= L[j * q + i]! * delta[j]!;
        delta[i]! /= L[i * q + i]!;
      }
      const rest = Float64Array.from(e);
      for (let t = date; t < T; t++) for (let i = 0; i < q; i++) rest[t]! -= delta[i]! * B[i]![t]!;
      projectOut(rest, Q);
      return rest;
    },
    thinned(most, keep) {
      const every = Math.max(1, Math.ceil(kept.length / most));
      return every === 1
        ? this
        : over(
            kept.filter((_, i) => i % every === 0 || i === keep),
            factors,
            B,
            Q,
          );
    },
  };
}

/** Takes the projection on orthonormal columns off, in place. */
export function projectOut(v: Float64Array, basis: readonly Float64Array[]): void {
  for (const q of basis) {
    let weight = 0;
    for (let t = 0; t < v.length; t++) weight += q[t]! * v[t]!;
    for (let t = 0; t < v.length; t++) v[t]! -= weight * q[t]!;
  }
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
