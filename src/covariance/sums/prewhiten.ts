import { identity, type Matrix, matrix, multiply, symmetricEigen, transpose } from "../../numeric/index.js";
import { inverse } from "../shape/inverse.js";
import { congruence } from "../shape/sandwich.js";
import { dotAt } from "../shape/vectors.js";
import { copyRows, type Series } from "./series.js";

const BLOCK = 2048;

/** Singular values of the autoregression beyond this are set to it (Andrews and Monahan 1992). */
export const SINGULAR_BOUND = 0.97;

export interface Prewhitened {
  /** The residuals of the autoregression, n − 1 rows, in standardised coordinates. */
  readonly series: Series;
  /** From standardised coordinates back to those of the scores, k×r. */
  readonly loading: Matrix;
  /** Largest singular value before the bound. */
  readonly largestSingularValue: number;
  readonly bounded: boolean;
  /** Directions in which the scores move at all; less than k when a score is always zero. */
  readonly rank: number;
  /** A sum over the residuals to a sum over the scores: (I − A)⁻¹ S (I − A)⁻ᵀ, times n/(n − 1) for the lost period. */
  recolour(sum: Matrix): Matrix;
}

/**
 * A first-order vector autoregression of the scores, as Andrews and Monahan (1992, Econometrica 60) prewhiten, but fitted to
 * scores standardised by Γ_0^(−1/2): singular values of raw coefficients change with the units and origins of the
 * regressors, these do not.
 */
export function prewhiten(series: Series): Prewhitened {
  const { rows: n, columns: k } = series.columns;
  const columns = Array.from({ length: k }, (_, j) => {
    const column = new Float64Array(n);
    copyRows(series, j, 0, n, column, 0);
    return column;
  });
  const { all, cross, past } = products(columns);
  const { standardise, loading, rank } = standardisation(all, n);
  const lagged = multiply(multiply(standardise, cross), transpose(standardise));
  const earlier = congruence(standardise, past);
  const { A, largest } = bound(multiply(lagged, inverse(earlier)));
  const residuals = residualsOf(columns, standardise, A);
  const back = inverse(minus(identity(rank), A));
  const colour = multiply(loading, back);
  return {
    series: { columns: residuals },
    loading,
    largestSingularValue: largest,
    bounded: largest > SINGULAR_BOUND,
    rank,
    recolour: (sum) => congruence(colour, sum, n / (n - 1)),
  };
}

/** Λ^(−1/2)U' and its inverse UΛ^(1/2) from Γ_0 = UΛU', without directions in which nothing moves. */
function standardisation(all: Matrix, n: number): { standardise: Matrix; loading: Matrix; rank: number } {
  const k = all.rows;
  const { values, vectors } = symmetricEigen(all);
  let rank = 0;
  while (rank < k && values[rank]! > 1e-13 * values[0]!) rank++;
  const standardise = matrix(rank, k);
  const loading = matrix(k, rank);
  for (let r = 0; r < rank; r++) {
    const root = Math.sqrt(values[r]! / n);
    for (let i = 0; i < k; i++) {
      const u = vectors.data[r * k + i]!;
      standardise.data[i * rank + r] = u / root;
      loading.data[r * k + i] = u * root;
    }
  }
  return { standardise, loading, rank };
}

/** Σ g_t g_t' over all t, Σ g_t g_{t−1}' and Σ g_{t−1} g_{t−1}' over t ≥ 2, in blocks that stay in the processor's cache. */
function products(columns: Float64Array[]): { all: Matrix; cross: Matrix; past: Matrix } {
  const k = columns.length;
  const n = columns[0]!.length;
  const all = matrix(k, k);
  const cross = matrix(k, k);
  for (let from = 0; from < n; from += BLOCK) {
    const length = Math.min(BLOCK, n - from);
    const pairs = Math.min(length, n - 1 - from);
    for (let j = 0; j < k; j++) {
      for (let i = 0; i < k; i++) {
        if (i <= j) all.data[j * k + i]! += dotAt(columns[i]!, from, columns[j]!, from, length);
        cross.data[j * k + i]! += dotAt(columns[i]!, from + 1, columns[j]!, from, pairs);
      }
    }
  }
  const past = matrix(k, k);
  for (let j = 0; j < k; j++) {
    for (let i = 0; i < k; i++) {
      if (i < j) all.data[i * k + j] = all.data[j * k + i]!;
      past.data[j * k + i] =
        all.data[Math.max(i, j) * k + Math.min(i, j)]! - columns[i]![n - 1]! * columns[j]![n - 1]!;
    }
  }
  return { all, cross, past };
}

/** A with its singular values held at the bound: A C min(1, bound/δ) C' for A = BΔC'. */
function bound(A: Matrix): { A: Matrix; largest: number } {
  const r = A.rows;
  const { values, vectors } = symmetricEigen(multiply(transpose(A), A));
  const largest = Math.sqrt(Math.max(0, values[0] ?? 0));
  if (!(largest > SINGULAR_BOUND)) return { A, largest };
  const shrink = matrix(r, r);
  for (let i = 0; i < r; i++) {
    const delta = Math.sqrt(Math.max(0, values[i]!));
    shrink.data[i * r + i] = Math.min(1, SINGULAR_BOUND / delta);
  }
  return { A: multiply(A, congruence(vectors, shrink)), largest };
}

/** g̃_t − A g̃_{t−1} for t ≥ 2. */
function residualsOf(columns: Float64Array[], standardise: Matrix, A: Matrix): Matrix {
  const n = columns[0]!.length;
  const r = A.rows;
  const carry = multiply(A, standardise);
  const result = matrix(n - 1, r);
  // In blocks that stay in the processor's cache while every pair of series goes through them.
  for (let from = 1; from < n; from += BLOCK) {
    const to = Math.min(n, from + BLOCK);
    for (let i = 0; i < r; i++) {
      const at = i * (n - 1) - 1;
      for (let j = 0; j < columns.length; j++) {
        const column = columns[j]!;
        const present = standardise.data[j * r + i]!;
        const past = carry.data[j * r + i]!;
        for (let t = from; t < to; t++) result.data[at + t]! += present * column[t]! - past * column[t - 1]!;
      }
    }
  }
  return result;
}

function minus(a: Matrix, b: Matrix): Matrix {
  return matrix(
    a.rows,
    a.columns,
    a.data.map((value, i) => value - b.data[i]!),
  );
}
