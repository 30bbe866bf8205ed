import { matrix } from "../../numeric/index.js";
import type { Kernel } from "../kernels.js";
import { dot } from "../shape/vectors.js";
import { type DependentSpectrum, diagonalised } from "./dependent-spectrum.js";
import { traceUnder } from "./dependent-trace.js";
import { type ContrastDesign, projectOut } from "./design.js";
import { direction } from "./direction.js";
import { Space } from "./space.js";
import { type LagOperator, lagOperator } from "./toeplitz.js";

/**
 * How a contrast's error and its HAC variance go together when the errors are N(0, Ω), Ω = LL': the eigenvalues of
 * B = L'MDKDML and the coordinates of L'w along their eigenvectors.
 *
 * By a block Krylov process in the inner product x'Ωy, started from w and a fixed random direction, so that only
 * products with Ω are needed: O(T) a step for AR(1). w lies in the space, hence its part is exact; what the space
 * does not reach of B is known by its trace.
 */
export function dependentSpectrum(
  design: ContrastDesign,
  kernel: Kernel,
  bandwidth: number,
  omega: LagOperator,
  steps: number,
): DependentSpectrum {
  const n = design.weights.length;
  const most = Math.min(steps, design.rank + 1);
  const form = projectedForm(design, kernel, bandwidth);
  const space = new Space(n, most, omega);
  const products = matrix(most, most);
  const next = new Float64Array(n);
  let draws = 0;
  const admitRandom = (): void => {
    next.set(direction(n, draws++));
    for (let t = 0; t < n; t++) if (design.weights[t] === 0) next[t] = 0;
    projectOut(design.basis, next);
    const before = dot(next, next);
    space.reduce(next);
    if (space.independent(next, before)) space.admit(next);
  };
  next.set(design.weights);
  const length = space.admit(next);
  if (most > 1) admitRandom();
  let largest = 0;
  for (let j = 0; j < space.count; j++) {
    form(space.images, j * n, next);
    const before = dot(next, next);
    space.reduce(next, products, j);
    if (space.count === most) continue;
    if (before > largest) largest = before;
    if (space.independent(next, largest)) space.admit(next);
    else if (space.count === j + 1) admitRandom();
  }
  const trace = traceUnder(design, kernel, bandwidth, omega);
  return diagonalised(products, space.count, length, trace, design.rank + 1);
}

/** p → M D K D M p. */
function projectedForm(
  { weights, basis }: ContrastDesign,
  kernel: Kernel,
  bandwidth: number,
): (p: Float64Array, from: number, out: Float64Array) => void {
  const n = weights.length;
  const K = lagOperator(kernel, bandwidth, n);
  const held = new Float64Array(n);
  return (p, from, out) => {
    for (let t = 0; t < n; t++) held[t] = p[from + t]!;
    projectOut(basis, held);
    for (let t = 0; t < n; t++) held[t]! *= weights[t]!;
    K(held, 0, out, 0);
    for (let t = 0; t < n; t++) out[t]! *= weights[t]!;
    projectOut(basis, out);
  };
}
