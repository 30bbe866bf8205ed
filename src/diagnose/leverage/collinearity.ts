import type { Regression } from "../../estimate/index.js";
import { columnOf, crossproduct, fromColumns, singularValues, symmetricEigen } from "../../numeric/index.js";
import { spansConstant } from "../parts/residuals.js";

/** How far the terms say the same thing. */
export interface Collinearity {
  /** 1/(1 − Rⱼ²) per term, about the mean where a constant is among the terms; NaN for the intercept. */
  readonly varianceInflation: readonly { readonly term: string; readonly factor: number }[];
  /** Largest singular value over each, of the terms scaled to unit length (Belsley, Kuh and Welsch 1980), ascending. */
  readonly conditionIndices: Float64Array;
  /** Share of each coefficient's variance (inner list, in the order of the terms) that goes with each condition index. */
  readonly proportions: readonly (readonly number[])[];
}

/** Variance inflation factors, condition indices and variance-decomposition proportions. */
export function collinearity(m: Regression): Collinearity {
  const { T, k } = m;
  const centre = spansConstant(m);
  const varianceInflation = m.terms.map((term, j) => {
    const x = columnOf(m.X, j);
    const mean = centre ? x.reduce((sum, v) => sum + v, 0) / T : 0;
    const spread = x.reduce((sum, v) => sum + (v - mean) ** 2, 0);
    const factor = m.gramInverse.data[j * k + j]! * spread;
    return { term, factor: j === m.interceptAt ? Number.NaN : Math.max(1, factor) };
  });
  const scaled = fromColumns(
    Array.from({ length: k }, (_, j) => {
      const x = columnOf(m.X, j);
      const length = Math.sqrt(x.reduce((sum, v) => sum + v * v, 0));
      return x.map((v) => v / length);
    }),
  );
  const singular = singularValues(crossproduct(m.Q, scaled)); // those of X itself: X = Q(Q'X)
  const { vectors } = symmetricEigen(crossproduct(scaled));
  const shares = Array.from({ length: k }, (_, i) =>
    Array.from({ length: k }, (_, j) => (vectors.data[i * k + j]! / singular[i]!) ** 2),
  );
  const totals = Array.from({ length: k }, (_, j) => shares.reduce((sum, row) => sum + row[j]!, 0));
  return {
    varianceInflation,
    conditionIndices: singular.map((s) => singular[0]! / s),
    proportions: shares.map((row) => row.map((share, j) => share / totals[j]!)),
  };
}
