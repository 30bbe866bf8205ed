import { alongContour } from "./contour.js";
import type { Matrix } from "./matrix.js";
import { brentMinimum } from "./minimum.js";
import { orthogonalLogDeterminant } from "./tridiagonal-determinant.js";

/** Both tails of the law of the Durbin–Watson ratio, each to its own relative accuracy. */
export interface RatioTails {
  /** P(D < d). */
  readonly lower: number;
  /** P(D > d). */
  readonly upper: number;
}

/**
 * The exact law of the Durbin–Watson ratio of regression residuals at d, for independent normal errors of equal
 * variance: Q is an orthonormal basis (T×k) of the regressors. `linked[t]`, where given, says whether rows t − 1 and
 * t are neighbours in time (1) or not (0); without it all are.
 *
 * P(D < d) = P(u'M(A − dI)Mu < 0) is the integral of the moment generating function along the vertical line through
 * the saddle point (Daniels 1954; Rice 1980), whose value at each node is a banded determinant: O(T k²) a node and
 * no T×T matrix. About 12 digits, also in the far tails.
 */
export function durbinWatsonTails(d: number, Q: Matrix, linked?: Uint8Array): RatioTails {
  const T = Q.rows;
  const { diagonal, links } = differenceForm(T, linked);
  if (!(d > 0)) return { lower: 0, upper: 1 };
  if (d >= 4) return { lower: 1, upper: 0 };
  const side = traceOfProjected(Q, diagonal, links) > d * (T - Q.columns) ? -1 : 1;
  // On this side of zero I − 2z(A − dI) stays positive definite up to the limit, whatever the regressors.
  const limit = side < 0 ? 1 / (2 * d) : 1 / (2 * (4 - d));
  const logMoment = (re: number, im: number): [number, number] => {
    const [logSize, angle] = orthogonalLogDeterminant(diagonal, links, d, re, im, Q);
    return [-logSize / 2, -angle / 2];
  };
  const objective = (w: number) => {
    const z = side * limit * w;
    return logMoment(z, 0)[0] - Math.log(Math.abs(z));
  };
  const { x } = brentMinimum(objective, 1e-9, 1 - 1e-9, 1e-4);
  const contour = { centre: side * limit * x, scale: curvatureScale(objective, x) * limit, tilt: 0 };
  const tail = Math.min(1, Math.abs(alongContour(logMoment, contour)));
  return side < 0 ? { lower: tail, upper: 1 - tail } : { lower: 1 - tail, upper: tail };
}

/** P(D < d); see `durbinWatsonTails`. */
export function durbinWatsonLower(d: number, Q: Matrix, linked?: Uint8Array): number {
  return durbinWatsonTails(d, Q, linked).lower;
}

/** Σ (e_t − e_{t−1})² over neighbours as e'Ae: the diagonal of A, and which off-diagonal entries are −1. */
function differenceForm(T: number, linked?: Uint8Array): { diagonal: Float64Array; links: Float64Array } {
  const diagonal = new Float64Array(T);
  const links = new Float64Array(T);
  for (let t = 1; t < T; t++) {
    if (linked && !linked[t]) continue;
    diagonal[t - 1]! += 1;
    diagonal[t]! += 1;
    links[t] = -1;
  }
  return { diagonal, links };
}

function traceOfProjected(Q: Matrix, diagonal: Float64Array, links: Float64Array): number {
  let trace = 0;
  for (let t = 0; t < Q.rows; t++) trace += diagonal[t]!;
  for (let j = 0; j < Q.columns; j++) {
    for (let t = 1; t < Q.rows; t++) {
      if (links[t] !== 0) trace -= (Q.data[j * Q.rows + t]! - Q.data[j * Q.rows + t - 1]!) ** 2;
    }
  }
  return trace;
}

function curvatureScale(objective: (w: number) => number, x: number): number {
  const step = 1e-3 * Math.min(x, 1 - x);
  const curvature = (objective(x + step) - 2 * objective(x) + objective(x - step)) / (step * step);
  return curvature > 0 ? 1 / Math.sqrt(curvature) : x;
}
