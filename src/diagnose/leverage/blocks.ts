import type { Regression } from "../../estimate/index.js";
import {
  cholesky,
  columnOf,
  fromColumns,
  matrix,
  NotPositiveDefinite,
  solveCholesky,
} from "../../numeric/index.js";
import { basisColumns } from "../parts/projection.js";

/** What leaving out a run of neighbouring rows does to the coefficients. */
export interface BlockInfluence {
  /** First and last row left out. */
  readonly from: number;
  readonly to: number;
  /** β̂ without the block, per term; NaN where the rest does not determine the coefficients. */
  readonly coefficients: readonly number[];
}

/**
 * The fit without each run of `length` neighbouring rows, starting at every `stride`-th row. With Q the basis of the terms,
 * S = Q_B'Q_B and δ = (I − S)⁻¹Q_B'ê, the coefficients move by −GX'Qδ: O(k³) a block after one pass, no refitting.
 */
export function blockInfluence(m: Regression, length: number, stride = 1): BlockInfluence[] {
  const { T, k } = m;
  const basis = basisColumns(m.Q);
  const back = toCoefficients(m, basis);
  const blocks: BlockInfluence[] = [];
  for (let from = 0; from + length <= T; from += stride) {
    const I = matrix(k, k);
    const g = new Float64Array(k);
    for (let i = 0; i < k; i++) {
      I.data[i * k + i] = 1;
      for (let t = from; t < from + length; t++) g[i]! += basis[i]![t]! * m.residuals[t]!;
      for (let j = 0; j <= i; j++) {
        let product = 0;
        for (let t = from; t < from + length; t++) product += basis[i]![t]! * basis[j]![t]!;
        I.data[i * k + j]! -= product;
        if (i !== j) I.data[j * k + i]! -= product;
      }
    }
    blocks.push({ from, to: from + length - 1, coefficients: without(m, I, g, back) });
  }
  return blocks;
}

/** GX'Q: takes coordinates in the basis to coefficients. */
function toCoefficients(m: Regression, basis: readonly Float64Array[]): Float64Array[] {
  const { k } = m;
  return basis.map((q) => {
    const products = Array.from({ length: k }, (_, i) =>
      columnOf(m.X, i).reduce((sum, x, t) => sum + x * q[t]!, 0),
    );
    return Float64Array.from({ length: k }, (_, j) =>
      products.reduce((sum, p, i) => sum + m.gramInverse.data[i * k + j]! * p, 0),
    );
  });
}

function without(
  m: Regression,
  rest: ReturnType<typeof matrix>,
  g: Float64Array,
  back: readonly Float64Array[],
): number[] {
  try {
    const L = cholesky(rest);
    // a pivot this small means that the rows left over hardly determine some coefficient
    for (let i = 0; i < m.k; i++) if (L.data[i * m.k + i]! < 1e-6) return new Array(m.k).fill(Number.NaN);
    const delta = solveCholesky(L, fromColumns([g])).data;
    return Array.from(m.coefficients, (b, j) => b - back.reduce((sum, c, i) => sum + c[j]! * delta[i]!, 0));
  } catch (problem) {
    if (problem instanceof NotPositiveDefinite) return new Array(m.k).fill(Number.NaN);
    throw problem;
  }
}
