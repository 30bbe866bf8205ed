import type { CovarianceEstimator } from "../../estimate/index.js";
import { matrix } from "../../numeric/index.js";
import { fisherLaw, studentLaw } from "../laws/classical-laws.js";
import { requireErrors } from "../remarks.js";

/**
 * s²(X'X)⁻¹ with s² = û'û/(T − k): right when the errors are uncorrelated and of one variance, and then exact with
 * t(T − k) and F(q, T − k) under normality.
 */
export function classical(): CovarianceEstimator {
  return {
    kind: "classical",
    label: "classical",
    options: {},
    on(regression) {
      requireErrors(regression, "classical");
      const { gramInverse, rss, T, k } = regression;
      const df = T - k;
      const s2 = rss / df;
      return {
        label: "classical",
        matrix: matrix(
          k,
          k,
          gramInverse.data.map((value) => s2 * value),
        ),
        details: { s2, df },
        remarks: [],
        reference: () => studentLaw(df),
        joint: (restrictions) => fisherLaw(restrictions.rows, df),
      };
    },
  };
}
