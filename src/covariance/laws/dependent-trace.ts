import { autocovariances, columnOf } from "../../numeric/index.js";
import { type Kernel, lagWeights, lastLag } from "../kernels.js";
import { dot } from "../shape/vectors.js";
import type { ContrastDesign } from "./design.js";
import { type Apply, lagOperator } from "./toeplitz.js";

/** tr(M D K D M Ω): with A = DKD, tr(AΩ) − 2 tr(Q'AΩQ) + tr(Q'AQ · Q'ΩQ). */
export function traceUnder(design: ContrastDesign, kernel: Kernel, bandwidth: number, omega: Apply): number {
  const { weights, basis } = design;
  const n = weights.length;
  const k = basis.columns;
  const K = lagOperator(kernel, bandwidth, n);
  let trace = unprojected(weights, kernel, bandwidth, omega);
  const images: Float64Array[] = [];
  const forms: Float64Array[] = [];
  const held = new Float64Array(n);
  for (let j = 0; j < k; j++) {
    const q = columnOf(basis, j);
    const image = new Float64Array(n);
    omega(q, image);
    images.push(image);
    const form = new Float64Array(n);
    for (let t = 0; t < n; t++) held[t] = weights[t]! * q[t]!;
    K(held, form);
    for (let t = 0; t < n; t++) form[t]! *= weights[t]!;
    forms.push(form);
    trace -= 2 * dot(form, image);
  }
  for (let j = 0; j < k; j++) {
    for (let i = 0; i < k; i++) {
      trace += dot(columnOf(basis, i), forms[j]!) * dot(columnOf(basis, j), images[i]!);
    }
  }
  return trace;
}

/** tr(DKDΩ) = Σ_j κ_j γ_j Σ_t w_t w_{t−j}. */
function unprojected(weights: Float64Array, kernel: Kernel, bandwidth: number, omega: Apply): number {
  const n = weights.length;
  const last = lastLag(kernel, bandwidth, n);
  const row = lagWeights(kernel, bandwidth, last);
  const first = new Float64Array(n);
  first[0] = 1;
  const gamma = new Float64Array(n);
  omega(first, gamma);
  const products = autocovariances(weights, last);
  let sum = gamma[0]! * products[0]!;
  for (let j = 1; j <= last; j++) sum += 2 * row[j]! * gamma[j]! * products[j]!;
  return sum;
}
