import { counterRandom, matrix } from "../../numeric/index.js";
import type { Kernel } from "../kernels.js";
import { addTimes, dot, scale } from "../shape/vectors.js";
import { type DependentSpectrum, diagonalised } from "./dependent-spectrum.js";
import { traceUnder } from "./dependent-trace.js";
import { type ContrastDesign, projectOut } from "./design.js";
import { type Apply, lagOperator } from "./toeplitz.js";

const SEED = 20_250_102;

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
  omega: Apply,
  steps: number,
): DependentSpectrum {
  const n = design.weights.length;
  const most = Math.min(steps, design.rank + 1);
  const form = projectedForm(design, kernel, bandwidth);
  const vectors: Float64Array[] = [];
  const images: Float64Array[] = [];
  const products = matrix(most, most);

  const admit = (x: Float64Array): number => {
    const image = new Float64Array(n);
    omega(x, image);
    const square = dot(x, image);
    if (!(square > 1e-26)) return 0;
    const length = Math.sqrt(square);
    scale(x, 1 / length);
    scale(image, 1 / length);
    vectors.push(x);
    images.push(image);
    return length;
  };
  /** Takes the space out of x; the parts taken are entries of column j of the projected B. */
  const reduce = (x: Float64Array, j?: number): Float64Array => {
    for (let i = 0; i < vectors.length; i++) {
      const part = dot(images[i]!, x);
      addTimes(x, -part, vectors[i]!);
      if (j !== undefined) products.data[j * most + i] = products.data[i * most + j] = part;
    }
    return x;
  };
  let draws = 0;
  const random = (): Float64Array => {
    const x = new Float64Array(n);
    counterRandom(SEED, draws++).fillNormal(x);
    for (let t = 0; t < n; t++) if (design.weights[t] === 0) x[t] = 0;
    projectOut(design.basis, x);
    return reduce(x);
  };

  const length = admit(Float64Array.from(design.weights));
  if (most > 1) admit(random());
  for (let j = 0; j < vectors.length; j++) {
    const out = new Float64Array(n);
    form(images[j]!, out);
    reduce(out, j);
    if (vectors.length < most && admit(out) === 0 && vectors.length === j + 1) admit(random());
  }
  const trace = traceUnder(design, kernel, bandwidth, omega);
  return diagonalised(products, vectors.length, length, trace, design.rank + 1);
}

/** p → M D K D M p. */
function projectedForm({ weights, basis }: ContrastDesign, kernel: Kernel, bandwidth: number): Apply {
  const n = weights.length;
  const K = lagOperator(kernel, bandwidth, n);
  const held = new Float64Array(n);
  return (p, out) => {
    held.set(p);
    projectOut(basis, held);
    for (let t = 0; t < n; t++) held[t]! *= weights[t]!;
    K(held, out);
    for (let t = 0; t < n; t++) out[t]! *= weights[t]!;
    projectOut(basis, out);
  };
}
