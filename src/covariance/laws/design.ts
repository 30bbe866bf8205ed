import { autocovariances, type Matrix } from "../../numeric/index.js";
import { type Kernel, lagWeights, lastLag } from "../kernels.js";
import { influenceWeights, type Scores } from "../scores.js";
import { addTimesAt, dot, dotAt, scale } from "../shape/vectors.js";
import { higherMoments } from "./band-moments.js";
import type { Form } from "./krylov.js";
import { localRatios } from "./local-moments.js";
import type { PowerSums } from "./spectrum.js";
import { type LagOperator, lagOperator, toeplitzOperator } from "./toeplitz.js";

/** Up to here exact moments cost next to nothing. */
const SHORT = 128;

/** A contrast on a design, as the law of its t ratio sees it. */
export interface ContrastDesign {
  /** w over the calendar, scaled to unit length: the contrast errs by w'u. */
  readonly weights: Float64Array;
  /** Orthonormal columns of X over the calendar. */
  readonly basis: Matrix;
  /** Dimension that the residuals move in. */
  readonly rank: number;
  readonly places?: Int32Array;
  /** w_t². */
  readonly squares: () => Float64Array;
  /** Σ_t w_t² w_{t−j}² for lags 0 to `last` at least. */
  readonly squareProducts: (last: number) => Float64Array;
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
  let held: Float64Array | undefined;
  const squares = (): Float64Array => {
    held ??= weights.map((w) => w * w);
    return held;
  };
  let products: Float64Array = new Float64Array();
  const squareProducts = (last: number): Float64Array => {
    if (products.length <= last) products = autocovariances(squares(), last);
    return products;
  };
  return { weights, basis, rank, squares, squareProducts, ...(places ? { places } : {}) };
}

/**
 * With iid errors of variance σ², a HAC variance of the contrast at a fixed bandwidth is σ² times the quadratic form
 * of M D K D M in independent standard normals, D = diag(w), M = I − QQ': this form, w of unit length.
 *
 * @param allLags whether distant lags of the quadratic spectral kernel count; without them its law is off by 1e-5.
 */
export function hacForm(design: ContrastDesign, kernel: Kernel, bandwidth: number, allLags = false): Form {
  const { weights, basis, rank, places } = design;
  const n = weights.length;
  const k = basis.columns;
  const K = allLags ? lagOperator(kernel, bandwidth, n) : nearOperator(kernel, bandwidth, n);
  const held = new Float64Array(n);
  const project = (x: Float64Array): void => projectOut(basis, x);
  const apply = (x: Float64Array, from: number, out: Float64Array): void => {
    for (let t = 0; t < n; t++) held[t] = weights[t]! * x[from + t]!;
    K(held, 0, out, 0);
    for (let t = 0; t < n; t++) out[t]! *= weights[t]!;
    project(out);
  };
  const last = lastLag(kernel, bandwidth, n);
  const row = lagWeights(kernel, bandwidth, last);
  const products = design.squareProducts(last);
  let square = products[0]!;
  for (let j = 1; j <= last; j++) square += 2 * row[j]! ** 2 * products[j]!;
  // tr(MAM) = tr A − tr(Q'AQ); tr((MAM)²) = tr A² − 2 tr(Q'A²Q) + tr((Q'AQ)²).
  let trace = 1;
  const images = imagesOf(design, K, basis.data);
  for (let j = 0; j < k; j++) {
    trace -= dotAt(basis.data, j * n, images, j * n, n);
    square -= 2 * dotAt(images, j * n, images, j * n, n);
    for (let i = 0; i < k; i++) square += dotAt(basis.data, i * n, images, j * n, n) ** 2;
  }
  const sums = { first: trace, second: Math.max(square, trace ** 2 / rank) };
  const local = (): PowerSums => {
    const { third, fourth } = localRatios(design.squares(), kernel, bandwidth);
    const { first, second } = sums;
    return { ...sums, third: (third * second ** 2) / first, fourth: (fourth * second ** 3) / first ** 2 };
  };
  return {
    size: n,
    rank,
    apply,
    project: places ? keepOnly(places, project) : project,
    sums,
    ...(n > SHORT && kernel.name !== "daniell" ? { local } : {}),
    exact: () => ({ ...sums, ...higherMoments(design, kernel, bandwidth, images) }),
  };
}

/** Lags of the quadratic spectral kernel that count, in bandwidths: the weights beyond are below 0.003 and alternate. */
const NEAR = 8;

/** K, without the distant lags of a kernel that dies out but does not end. */
function nearOperator(kernel: Kernel, bandwidth: number, n: number): LagOperator {
  const near = Math.ceil(NEAR * bandwidth) + 4;
  if (kernel.name !== "quadratic spectral" || near > n / 3) return lagOperator(kernel, bandwidth, n);
  return toeplitzOperator(lagWeights(kernel, bandwidth, near), n);
}

/** DKDx for k columns x that lie side by side. */
export function imagesOf(design: ContrastDesign, K: LagOperator, columns: Float64Array): Float64Array {
  const { weights, basis } = design;
  const n = weights.length;
  const k = basis.columns;
  const products = new Float64Array(n * k);
  const images = new Float64Array(n * k);
  for (let j = 0; j < k; j++) {
    for (let t = 0; t < n; t++) products[j * n + t] = weights[t]! * columns[j * n + t]!;
  }
  for (let j = 0; j < k; j += 2) K(products, j * n, images, j * n, j + 1 < k);
  for (let j = 0; j < k; j++) for (let t = 0; t < n; t++) images[j * n + t]! *= weights[t]!;
  return images;
}

/** x ← x − QQ'x. */
export function projectOut({ rows: n, columns: k, data }: Matrix, x: Float64Array): void {
  for (let j = 0; j < k; j++) addTimesAt(x, 0, -dotAt(data, j * n, x, 0, n), data, j * n, n);
}

function keepOnly(places: Int32Array, project: (x: Float64Array) => void): (x: Float64Array) => void {
  return (x) => {
    const kept = new Float64Array(x.length);
    for (const place of places) kept[place] = x[place]!;
    x.set(kept);
    project(x);
  };
}
