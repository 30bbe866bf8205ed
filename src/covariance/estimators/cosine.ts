import type { CovarianceEstimator } from "../../estimate/index.js";
import { InputError } from "../../numeric/index.js";
import { fisherLaw, studentLaw } from "../laws/classical-laws.js";
import {
  caution,
  exactPeriods,
  missingPeriods,
  nearUnitRoot,
  note,
  requireErrors,
  thinData,
} from "../remarks.js";
import { cosineTerms } from "../rules/growth.js";
import { scoresOf } from "../scores.js";
import { congruence } from "../shape/sandwich.js";
import { cosineSum } from "../sums/cosine.js";
import { scoreSeries } from "../sums/series.js";

export interface CosineOptions {
  /** Number ν of cosines; ⌊0.4 T^(2/3)⌋ unless said. */
  readonly terms?: number;
  /** Multiply by T/(T − k); true unless said. */
  readonly factor?: boolean;
}

/**
 * Equal-weighted cosines: the scores' first ν cosine coefficients taken as ν independent draws of their long-run
 * variance (Phillips 2005; Müller 2007; Lazarus, Lewis, Stock and Watson 2018). t with ν degrees of freedom; for q
 * restrictions ((ν − q + 1)/(νq)) W is F(q, ν − q + 1).
 *
 * @throws InputError for a number of cosines below 1 or, on a fit, above T − k.
 */
export function cosine(options: CosineOptions = {}): CovarianceEstimator {
  const { terms, factor = true } = options;
  if (terms !== undefined && !(Number.isInteger(terms) && terms >= 1)) {
    throw new InputError(`cosine: terms must be a whole number from 1 on, not ${terms}.`);
  }
  return {
    kind: "cosine",
    label: "cosines",
    options: { ...(terms === undefined ? {} : { terms }), factor },
    on(regression) {
      requireErrors(regression, "cosine");
      const scores = scoresOf(regression);
      const { T, k, span } = scores;
      const nu = terms ?? cosineTerms(T, k);
      if (nu > T - k) {
        throw new InputError(
          `cosine: ${nu} cosines are more than the ${T - k} degrees of freedom of ${T} periods and ${k} coefficients. ` +
            `Ask for at most ${T - k}.`,
        );
      }
      const c = factor ? T / (T - k) : 1;
      return {
        label: `${nu} equal-weighted cosines`,
        matrix: congruence(scores.back, cosineSum(scoreSeries(scores), nu), c),
        details: { terms: nu, rule: terms === undefined ? "⌊0.4 T^(2/3)⌋" : "given", df: nu, factor: c },
        remarks: [
          ...(nu < 4 ? [caution(`Only ${nu} cosines: the intervals rest on ${nu} degrees of freedom.`)] : []),
          ...(span === T ? [] : [note("With missing periods the t law of the cosines is an approximation.")]),
          ...missingPeriods(regression),
          ...thinData(regression),
          ...nearUnitRoot(regression),
          ...exactPeriods(regression),
        ],
        reference: () => studentLaw(nu),
        joint(restrictions) {
          const q = restrictions.rows;
          if (q > nu) {
            throw new InputError(
              `cosine: ${q} restrictions cannot be tested jointly with ${nu} cosines: the covariance has rank ${nu}. ` +
                `Test at most ${nu}, or ask for more cosines.`,
            );
          }
          return fisherLaw(q, nu - q + 1, (nu - q + 1) / (nu * q));
        },
      };
    },
  };
}
