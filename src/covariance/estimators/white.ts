import { suggestion } from "../../data/index.js";
import type { CovarianceEstimator, Regression } from "../../estimate/index.js";
import { columnOf, InputError, type Matrix, matrix } from "../../numeric/index.js";
import { fisherLaw, studentLaw } from "../laws/classical-laws.js";
import { exactPeriods, exactRows, listed, requireErrors, rowName, thinData } from "../remarks.js";
import { scoresOf } from "../scores.js";
import { congruence } from "../shape/sandwich.js";
import { dot } from "../shape/vectors.js";

export type WhiteType = "HC0" | "HC1" | "HC2" | "HC3" | "HC4";

/** ω_t at leverage h. Sources: Eicker 1963, White 1980; Hinkley 1977; MacKinnon and White 1985; Cribari-Neto 2004. */
const weights: Record<WhiteType, (h: number, T: number, k: number) => number> = {
  HC0: () => 1,
  HC1: (_, T, k) => T / (T - k),
  HC2: (h) => 1 / (1 - h),
  HC3: (h) => 1 / (1 - h) ** 2,
  HC4: (h, T, k) => (1 - h) ** -Math.min(4, (T * h) / k),
};

/**
 * White's covariance, robust to errors of uneven variance but not to errors that depend on their past:
 * (X'X)⁻¹ (Σ ω_t û_t² x_t x_t') (X'X)⁻¹.
 *
 * @param type `HC3` unless said. t(T − k) and F(q, T − k).
 * @throws InputError for another type, and from HC2–HC4 where a period has leverage one.
 */
export function white(type: WhiteType = "HC3"): CovarianceEstimator {
  if (!Object.hasOwn(weights, type)) {
    throw new InputError(`white: there is no type "${type}".${suggestion(type, Object.keys(weights))}`);
  }
  const label = `White ${type}`;
  return {
    kind: "white",
    label,
    options: { type },
    on(regression) {
      requireErrors(regression, label);
      const { T, k } = regression;
      const leveraged = type !== "HC0" && type !== "HC1";
      if (leveraged) refuseExactRows(regression, type);
      const scores = scoresOf(regression);
      const sum = weightedSum(regression, leveraged ? regression.leverage : undefined, weights[type]);
      return {
        label,
        matrix: congruence(scores.back, sum),
        details: { type, df: T - k, factor: type === "HC1" ? T / (T - k) : 1 },
        remarks: [...thinData(regression), ...(leveraged ? [] : exactPeriods(regression))],
        reference: () => studentLaw(T - k),
        joint: (restrictions) => fisherLaw(restrictions.rows, T - k),
      };
    },
  };
}

function refuseExactRows(regression: Regression, type: WhiteType): void {
  const rows = exactRows(regression);
  if (rows.length === 0) return;
  const where = listed(rows.map((row) => rowName(regression, row)));
  throw new InputError(
    `white: ${type} divides by 1 − leverage, and ${where} ${rows.length === 1 ? "has" : "have"} leverage one: ` +
      `a term fits that period alone. Use "HC1", or drop the term or the period.`,
  );
}

/** Σ ω_t û_t² q_t q_t'. */
function weightedSum(
  { Q, residuals, T, k }: Regression,
  leverage: Float64Array | undefined,
  weight: (h: number, T: number, k: number) => number,
): Matrix {
  const factors = new Float64Array(T);
  for (let t = 0; t < T; t++) factors[t] = weight(leverage ? leverage[t]! : 0, T, k) * residuals[t]! ** 2;
  const result = matrix(k, k);
  const product = new Float64Array(T);
  for (let j = 0; j < k; j++) {
    const q = columnOf(Q, j);
    for (let t = 0; t < T; t++) product[t] = factors[t]! * q[t]!;
    for (let i = 0; i <= j; i++) {
      result.data[j * k + i] = result.data[i * k + j] = dot(columnOf(Q, i), product);
    }
  }
  return result;
}
