import type { CovarianceEstimator, Regression } from "../../estimate/index.js";
import { columnOf, InputError, type Matrix, matrix } from "../../numeric/index.js";
import { fisherLaw, studentLaw } from "../laws/classical-laws.js";
import { exactPeriods, missingPeriods, nearUnitRoot, note, requireErrors, thinData } from "../remarks.js";
import { scoresOf } from "../scores.js";
import { congruence } from "../shape/sandwich.js";

export interface BatchOptions {
  /** Periods in a batch; an eighth of the sample unless said. */
  readonly length?: number;
}

/**
 * Non-overlapping batches: the scores summed over G stretches of equal length, the sums taken as independent
 * (Bester, Conley and Hansen 2011, Journal of Econometrics 165). t with G − 1 degrees of freedom; for q restrictions
 * ((G − q)/((G − 1)q)) W is F(q, G − q).
 *
 * @throws InputError for a length below 1 or, on a fit, one that leaves fewer than two batches.
 */
export function batches(options: BatchOptions = {}): CovarianceEstimator {
  const { length } = options;
  if (length !== undefined && !(Number.isInteger(length) && length >= 1)) {
    throw new InputError(`batches: length must be a whole number of periods from 1 on, not ${length}.`);
  }
  return {
    kind: "batches",
    label: "batches",
    options: length === undefined ? {} : { length },
    on(regression) {
      requireErrors(regression, "batches");
      const { T } = regression;
      const G = length === undefined ? Math.min(8, T) : Math.round(T / length);
      if (G < 2) {
        throw new InputError(
          `batches: batches of ${length} periods cut ${T} into ${G}, and the variance between batches takes two at least. ` +
            `Ask for a length of at most ${Math.floor(T / 2)}.`,
        );
      }
      const even = T % G === 0;
      const shown = even ? `${T / G}` : `${Math.floor(T / G)} or ${Math.ceil(T / G)}`;
      const scores = scoresOf(regression);
      return {
        label: `${G} batches of ${shown} periods`,
        matrix: congruence(scores.back, batchSum(regression, G), G / (G - 1)),
        details: { batches: G, length: T / G, df: G - 1, factor: G / (G - 1) },
        remarks: [
          ...(even ? [] : [note(`${T} periods do not divide by ${G}: batches differ by one period.`)]),
          ...missingPeriods(regression),
          ...thinData(regression),
          ...nearUnitRoot(regression),
          ...exactPeriods(regression),
        ],
        reference: () => studentLaw(G - 1),
        joint(restrictions) {
          const q = restrictions.rows;
          if (q >= G) {
            throw new InputError(
              `batches: ${q} restrictions cannot be tested jointly with ${G} batches. ` +
                `Test at most ${G - 1}, or ask for shorter batches.`,
            );
          }
          return fisherLaw(q, G - q, (G - q) / ((G - 1) * q));
        },
      };
    },
  };
}

/** Σ H_b H_b' over batches of consecutive rows, H_b the sum of q_t û_t. */
function batchSum({ Q, residuals, T, k }: Regression, G: number): Matrix {
  const sums = matrix(G, k);
  for (let j = 0; j < k; j++) {
    const q = columnOf(Q, j);
    for (let b = 0; b < G; b++) {
      const end = Math.floor(((b + 1) * T) / G);
      let sum = 0;
      for (let t = Math.floor((b * T) / G); t < end; t++) sum += q[t]! * residuals[t]!;
      sums.data[j * G + b] = sum;
    }
  }
  const result = matrix(k, k);
  for (let j = 0; j < k; j++) {
    for (let i = 0; i < k; i++) {
      for (let b = 0; b < G; b++) result.data[j * k + i]! += sums.data[i * G + b]! * sums.data[j * G + b]!;
    }
  }
  return result;
}
