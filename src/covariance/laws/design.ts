import { autocovariances, columnOf, type Matrix } from "../../numeric/index.js";
import { type Kernel, lagWeights, lastLag } from "../kernels.js";
import { influenceWeights, type Scores } from "../scores.js";
import { addTimes, dot, scale } from "../shape/vectors.js";
import { higherMoments } from "./band-moments.js";
import type { Form } from "./krylov.js";
import { lagOperator } from "./toeplitz.js";

/** A contrast on a design, as the law of its t ratio sees it. */
export interface ContrastDesign {
  /** w over the calendar, scaled to unit length: the contrast errs by w'u. */
  readonly weights: Float64Array;
  /** Orthonormal columns of X over the calendar. */
  readonly basis: Matrix;
  /** Dimension that the residuals move in. */
  readonly rank: number;
  readonly places?: Int32Array;
  /** Σ_t w_t² w_{t−j}² for every lag j. */
  readonly squareProducts: () => Float64Array;
}

export function contrastDesign(scores: Scores, contrast: Float64Array): ContrastDesign {
  const weights = influenceWeights(scores, contrast);
  scale(weights, 1 / Math.sqrt(dot(weights, weights)));
  return designOf(weights, scores.basis, scores.T - scores.k, scores.places);
}

/** A design from unit-length weights and an orthonormal basis. */
export function designOf(
  weights: Float64Array,
  basis: Matrix,
  rank: number,
  places?: Int32Array,
): ContrastDesign {
  let products: Float64Array | undefined;
  const squareProducts = (): Float64Array => {
    products ??= autocovariances(
      weights.map((w) => w * w),
      weights.length - 1,
    );
    return products;
  };
  return { weights, basis, rank, squareProducts, ...(places ? { places } : {}) };
}

/**
 * With iid errors of variance σ², a HAC variance of the contrast at a fixed bandwidth is σ² times the quadratic form
 * of M D K D M in independent standard normals, D = diag(w), M = I − QQ': this form, w of unit length.
 */
export function hacForm(design: ContrastDesign, kernel: Kernel, bandwidth: number): Form {
  const { weights, basis, rank, places } = design;
  const n = weights.length;
  const k = basis.columns;
  const K = lagOperator(kernel, bandwidth, n);
  const held = new Float64Array(n);
  const project = (x: Float64Array): void => projectOut(basis, x);
  const raw = (x: Float64Array, out: Float64Array): void => {
    for (let t = 0; t < n; t++) held[t] = weights[t]! * x[t]!;
    K(held, out);
    for (let t = 0; t < n; t++) out[t]! *= weights[t]!;
  };
  const apply = (x: Float64Array, out: Float64Array): void => {
    raw(x, out);
    project(out);
  };
  const last = lastLag(kernel, bandwidth, n);
  const row = lagWeights(kernel, bandwidth, last);
  const products = design.squareProducts();
  let square = products[0]!;
  for (let j = 1; j <= last; j++) square += 2 * row[j]! ** 2 * products[j]!;
  // tr(MAM) = tr A − tr(Q'AQ); tr((MAM)²) = tr A² − 2 tr(Q'A²Q) + tr((Q'AQ)²).
  let trace = 1;
  const image = new Float64Array(n);
  for (let j = 0; j < k; j++) {
    raw(columnOf(basis, j), image);
    trace -= dot(columnOf(basis, j), image);
    square -= 2 * dot(image, image);
    for (let i = 0; i < k; i++) square += dot(columnOf(basis, i), image) ** 2;
  }
  const clean = places ? keepOnly(places, project) : project;
  const sums = {
    first: trace,
    second: Math.max(square, trace ** 2 / rank),
    ...higherMoments(design, kernel, bandwidth),
  };
  return { size: n, rank, apply, project: clean, sums };
}

/** x ← x − QQ'x. */
export function projectOut(basis: Matrix, x: Float64Array): void {
  for (let j = 0; j < basis.columns; j++) {
    const q = columnOf(basis, j);
    addTimes(x, -dot(q, x), q);
  }
}

function keepOnly(places: Int32Array, project: (x: Float64Array) => void): (x: Float64Array) => void {
  return (x) => {
    const kept = new Float64Array(x.length);
    for (const place of places) kept[place] = x[place]!;
    x.set(kept);
    project(x);
  };
}
