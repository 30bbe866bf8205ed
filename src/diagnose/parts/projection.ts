import { columnOf, type Matrix } from "../../numeric/index.js";

function subtractProjection(v: Float64Array, basis: readonly Float64Array[]): void {
  for (const q of basis) {
    let weight = 0;
    for (let t = 0; t < v.length; t++) weight += q[t]! * v[t]!;
    for (let t = 0; t < v.length; t++) v[t]! -= weight * q[t]!;
  }
}

const norm = (v: Float64Array) => Math.sqrt(v.reduce((sum, x) => sum + x * x, 0));

/** The columns of an orthonormal basis as separate arrays (views). */
export function basisColumns(Q: Matrix): Float64Array[] {
  return Array.from({ length: Q.columns }, (_, j) => columnOf(Q, j));
}

/** What is left of `v` after regressing it on an orthonormal basis (projected out twice, for digits). */
export function residualised(v: Float64Array, basis: readonly Float64Array[]): Float64Array {
  const rest = Float64Array.from(v);
  subtractProjection(rest, basis);
  subtractProjection(rest, basis);
  return rest;
}

/** What regressing `target` on a basis and then on further columns, one by one, leaves over. */
export interface Additions {
  /** Residual sum of squares after the first 0, 1, ..., n columns were added. */
  readonly rss: Float64Array;
  /** Number of linearly independent ones among the first 0, 1, ..., n columns, given the basis. */
  readonly rank: Int32Array;
  /** Residuals with all of them added. */
  readonly residuals: Float64Array;
  /** An orthonormal basis of what the columns added to the given one. */
  readonly directions: readonly Float64Array[];
}

/**
 * Adds columns to a regression of `target` on an orthonormal basis, by Gram–Schmidt with every projection done
 * twice. A column that is a linear combination of what came before (less than `tolerance` of its length is new)
 * adds nothing and does not count towards the rank.
 */
export function addColumns(
  target: Float64Array,
  basis: readonly Float64Array[],
  columns: readonly Float64Array[],
  tolerance = 1e-9,
): Additions {
  const residuals = residualised(target, basis);
  const directions = [...basis];
  const rss = new Float64Array(columns.length + 1);
  const rank = new Int32Array(columns.length + 1);
  rss[0] = norm(residuals) ** 2;
  columns.forEach((column, j) => {
    const fresh = residualised(column, directions);
    const length = norm(fresh);
    const independent = length > tolerance * norm(column);
    if (independent) {
      for (let t = 0; t < fresh.length; t++) fresh[t]! /= length;
      directions.push(fresh);
      subtractProjection(residuals, [fresh]);
    }
    rank[j + 1] = rank[j]! + (independent ? 1 : 0);
    rss[j + 1] = independent ? norm(residuals) ** 2 : rss[j]!;
  });
  return { rss, rank, residuals, directions: directions.slice(basis.length) };
}
