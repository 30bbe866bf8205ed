import type { Remark } from "../data/index.js";
import type { Regression } from "../estimate/index.js";
import { entry, InputError, type Matrix, symmetricEigen } from "../numeric/index.js";
import { firstOrder } from "./rules/andrews.js";
import { observedMask, rawScores } from "./rules/raw-scores.js";
import { scoresOf } from "./scores.js";

export const caution = (text: string): Remark => ({ severity: "caution", text });
export const note = (text: string): Remark => ({ severity: "note", text });

/** A leverage from which a period is fitted exactly. */
const EXACT = 1 - 1e-10;
/** First-order autocorrelation of a score from which it is near a unit root. */
const NEAR_UNIT_ROOT = 0.9;

/** `a`, `a and b`, `a, b and c`; of a long list the first ones and how many more. */
export function listed(names: readonly string[], most = 6): string {
  if (names.length > most) return `${names.slice(0, most).join(", ")} and ${names.length - most} more`;
  if (names.length < 2) return names.join("");
  return `${names.slice(0, -1).join(", ")} and ${names[names.length - 1]}`;
}

/** Refuses a regression that leaves nothing to judge errors by. */
export function requireErrors(regression: Regression, asked: string): void {
  const { T, k, rss } = regression;
  if (T <= k) {
    throw new InputError(
      `${asked}: ${T} periods and ${k} coefficients leave no degrees of freedom. Use more periods or fewer terms.`,
    );
  }
  if (!(rss > 0)) {
    throw new InputError(
      `${asked}: the fit is exact, so there are no errors to judge it by. Is the outcome among the terms?`,
    );
  }
}

/** How a row is called: by its period where the regression knows it, else by its number. */
export function rowName(regression: Regression, row: number): string {
  return regression.periodName ? regression.periodName(row) : `row ${row + 1}`;
}

/** Rows that are fitted exactly. */
export function exactRows(regression: Regression): number[] {
  const rows: number[] = [];
  for (let t = 0; t < regression.T; t++) if (regression.leverage[t]! > EXACT) rows.push(t);
  return rows;
}

/** Too few periods for the coefficients there are. */
export function thinData({ T, k }: Regression): Remark[] {
  if (T >= 30 * k) return [];
  return [
    caution(
      `${T} periods for ${k} ${k === 1 ? "coefficient" : "coefficients"}: fewer than 30 to a coefficient, thin ground for a robust covariance.`,
    ),
  ];
}

/** Periods with leverage one: their errors cannot enter a variance built from residuals. */
export function exactPeriods(regression: Regression): Remark[] {
  const rows = exactRows(regression);
  if (rows.length === 0) return [];
  const { X, gramInverse, k, terms } = regression;
  const hit = terms.filter((_, a) =>
    rows.some((row) => {
      let weight = 0;
      for (let j = 0; j < k; j++) weight += entry(gramInverse, a, j) * entry(X, row, j);
      return weight * weight > 0.01 * entry(gramInverse, a, a);
    }),
  );
  const where = listed(rows.map((row) => rowName(regression, row)));
  return [
    caution(
      `Leverage one at ${where}: fitted exactly, so the error there is in no variance built from residuals. ` +
        `The standard error of ${listed(hit)} is too small.`,
    ),
  ];
}

const persistent = new WeakMap<Regression, Remark[]>();

/** Scores that hardly come back: every bandwidth is then too short. */
export function nearUnitRoot(regression: Regression): Remark[] {
  let remarks = persistent.get(regression);
  if (!remarks) {
    remarks = findPersistent(regression);
    persistent.set(regression, remarks);
  }
  return remarks;
}

function findPersistent(regression: Regression): Remark[] {
  const scores = scoresOf(regression);
  const raw = rawScores(regression, scores);
  const observed = observedMask(scores);
  const found: { term: string; rho: number }[] = [];
  regression.terms.forEach((term, a) => {
    const { rho } = firstOrder(raw.column(a), observed);
    if (rho >= NEAR_UNIT_ROOT) found.push({ term, rho });
  });
  if (found.length === 0) return [];
  const largest = Math.max(...found.map(({ rho }) => rho));
  return [
    caution(
      `The scores of ${listed(found.map(({ term }) => term))} are near a unit root (first-order coefficient up to ` +
        `${largest.toFixed(3)}): the variance is too small at every bandwidth.`,
    ),
  ];
}

/** Missing periods: how the lags were taken. */
export function missingPeriods(regression: Regression): Remark[] {
  const { T, span } = scoresOf(regression);
  if (span === T) return [];
  return [
    note(
      `${span - T} periods are missing between the first and the last; lags are counted in time, and a missing period adds nothing.`,
    ),
  ];
}

/** Variances that came out negative, and matrices that are not positive semidefinite without one showing. */
export function notPositive(V: Matrix, terms: readonly string[]): Remark[] {
  const negative = terms.filter((_, a) => !(entry(V, a, a) > 0));
  if (negative.length > 0) {
    return [
      caution(
        `The variance of ${listed(negative)} came out negative: no standard error, interval or p. ` +
          `Bartlett, Parzen, quadratic spectral and Daniell weights cannot do that.`,
      ),
    ];
  }
  // Scaled to correlations, so that units do not decide what counts as negative.
  const k = V.rows;
  const scaled = { rows: k, columns: k, data: new Float64Array(k * k) };
  for (let j = 0; j < k; j++) {
    for (let i = 0; i < k; i++) {
      scaled.data[j * k + i] = entry(V, i, j) / Math.sqrt(entry(V, i, i) * entry(V, j, j));
    }
  }
  const { values } = symmetricEigen(scaled);
  if (values[k - 1]! >= -1e-10 * k) return [];
  return [
    caution(
      "The covariance matrix is not positive semidefinite: some combinations of coefficients have a negative variance.",
    ),
  ];
}
