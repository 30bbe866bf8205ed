import type { Regression } from "../estimate/index.js";
import { columnOf, InputError, type Matrix, matrix } from "../numeric/index.js";
import { inverse } from "./shape/inverse.js";
import { dotAt } from "./shape/vectors.js";

/**
 * The scores x_t û_t of a regression in coordinates that no scaling of X can spoil. With X = QR the coefficients'
 * influences are (X'X)⁻¹ x_t û_t = R⁻¹ q_t û_t, so every estimator sums products of q_t û_t and comes back by R⁻¹:
 * the digits lost do not depend on the units, the origin or the condition of X.
 *
 * Rows stand on a calendar without holes: a missing period has a zero row and a zero residual, which leaves
 * every positive semidefinite sum so (Parzen 1963).
 */
export interface Scores {
  /** span×k: q_t, zero where the period is missing. */
  readonly basis: Matrix;
  /** û_t over the calendar. */
  readonly residuals: Float64Array;
  /** R⁻¹, k×k. */
  readonly back: Matrix;
  /** Periods observed. */
  readonly T: number;
  readonly k: number;
  /** Periods from the first to the last, the missing ones among them counted. */
  readonly span: number;
  /** Calendar place of each observed row; absent when no period is missing. */
  readonly places?: Int32Array;
}

const known = new WeakMap<Regression, Scores>();

/** The scores of a regression, formed once. */
export function scoresOf(regression: Regression): Scores {
  let scores = known.get(regression);
  if (!scores) {
    scores = form(regression);
    known.set(regression, scores);
  }
  return scores;
}

function form(regression: Regression): Scores {
  const { X, Q, residuals, T, k, periods } = regression;
  const back = inverse(products(Q, X));
  const span = T === 0 ? 0 : periods[T - 1]! - periods[0]! + 1;
  if (span === T) return { basis: Q, residuals, back, T, k, span };
  if (span > 64 * T + 10_000) {
    throw new InputError(
      `covariance: ${T} observed periods are scattered over a stretch of ${span}, too thin for lagged products. ` +
        `Fit the stretches apart, or load the data at a coarser step.`,
    );
  }
  const places = Int32Array.from(periods, (period) => period - periods[0]!);
  const basis = matrix(span, k);
  for (let j = 0; j < k; j++) spread(columnOf(Q, j), places, columnOf(basis, j));
  return { basis, residuals: spread(residuals, places, new Float64Array(span)), back, T, k, span, places };
}

/** Q'X. */
function products(Q: Matrix, X: Matrix): Matrix {
  const { rows: n, columns: k } = X;
  const result = matrix(k, k);
  for (let j = 0; j < k; j++) {
    for (let i = 0; i < k; i++) result.data[j * k + i] = dotAt(Q.data, i * n, X.data, j * n, n);
  }
  return result;
}

/** Puts each value at its calendar place. */
function spread(values: Float64Array, places: Int32Array, onto: Float64Array): Float64Array {
  for (let t = 0; t < places.length; t++) onto[places[t]!] = values[t]!;
  return onto;
}

/** The weights w with c'β̂ − c'β = w'u, over the calendar: w = Q R⁻ᵀ c. */
export function influenceWeights(scores: Scores, contrast: Float64Array): Float64Array {
  const { basis, back, k, span } = scores;
  const weights = new Float64Array(span);
  for (let j = 0; j < k; j++) {
    let a = 0;
    for (let i = 0; i < k; i++) a += back.data[j * k + i]! * contrast[i]!;
    if (a === 0) continue;
    const q = columnOf(basis, j);
    for (let t = 0; t < span; t++) weights[t]! += a * q[t]!;
  }
  return weights;
}

/** What each period adds to c'β̂ beyond c'β: w_t û_t over the calendar. */
export function influenceSeries(scores: Scores, contrast: Float64Array): Float64Array {
  const series = influenceWeights(scores, contrast);
  for (let t = 0; t < series.length; t++) series[t]! *= scores.residuals[t]!;
  return series;
}
