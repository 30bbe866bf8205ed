import { autocovariances } from "../../numeric/index.js";
import { type Kernel, lagWeights, lastLag } from "../kernels.js";
import { dot, dotAt } from "../shape/vectors.js";
import { type ContrastDesign, imagesOf } from "./design.js";
import { type LagOperator, lagOperator } from "./toeplitz.js";

/** tr(M D K D M Ω): with A = DKD, tr(AΩ) − 2 tr(Q'AΩQ) + tr(Q'AQ · Q'ΩQ). */
export function traceUnder(
  design: ContrastDesign,
  kernel: Kernel,
  bandwidth: number,
  omega: LagOperator,
): number {
  const { weights, basis } = design;
  const n = weights.length;
  const k = basis.columns;
  const q = basis.data;
  const forms = imagesOf(design, lagOperator(kernel, bandwidth, n), q);
  const images = new Float64Array(n * k);
  for (let j = 0; j < k; j += 2) omega(q, j * n, images, j * n, j + 1 < k);
  let trace = unprojected(weights, kernel, bandwidth, omega) - 2 * dot(forms, images);
  for (let j = 0; j < k; j++) {
    for (let i = 0; i < k; i++) {
      trace += dotAt(q, i * n, forms, j * n, n) * dotAt(q, j * n, images, i * n, n);
    }
  }
  return trace;
}

/** tr(DKDΩ) = Σ_j κ_j γ_j Σ_t w_t w_{t−j}. */
function unprojected(weights: Float64Array, kernel: Kernel, bandwidth: number, omega: LagOperator): number {
  const n = weights.length;
  const last = lastLag(kernel, bandwidth, n);
  const row = lagWeights(kernel, bandwidth, last);
  const first = new Float64Array(n);
  first[0] = 1;
  const gamma = new Float64Array(n);
  omega(first, 0, gamma, 0);
  const products = autocovariances(weights, last);
  let sum = gamma[0]! * products[0]!;
  for (let j = 1; j <= last; j++) sum += 2 * row[j]! * gamma[j]! * products[j]!;
  return sum;
}
