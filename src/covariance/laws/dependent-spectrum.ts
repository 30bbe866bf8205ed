import type { Matrix } from "../../numeric/index.js";
import { craigNodes } from "./craig.js";
import { tridiagonalEigenvalues } from "./tridiagonal.js";
import { tridiagonalise } from "./tridiagonalise.js";

/** Eigenvalues θ of B, squared coordinates ζ of L'w along them, and `count` further eigenvalues `rest`. */
export interface DependentSpectrum {
  readonly theta: Float64Array;
  readonly zeta: Float64Array;
  readonly rest: number;
  readonly count: number;
}

/** From the projected B, whose first basis vector is L'w / length. */
export function diagonalised(
  products: Matrix,
  size: number,
  length: number,
  trace: number,
  rank: number,
): DependentSpectrum {
  const B = new Float64Array(size * size);
  for (let j = 0; j < size; j++) {
    for (let i = 0; i < size; i++) B[j * size + i] = products.data[j * products.rows + i]!;
  }
  const { diagonal, side } = tridiagonalise(B, size);
  const zeta = new Float64Array(size);
  zeta[0] = length;
  tridiagonalEigenvalues(diagonal, side, zeta);
  const theta = diagonal.map((value) => Math.max(0, value));
  let left = trace;
  for (let i = 0; i < size; i++) {
    zeta[i]! *= zeta[i]!;
    left -= theta[i]!;
  }
  if (size >= rank || left <= 1e-12 * trace) return { theta, zeta, rest: 0, count: 0 };
  const rest = typicalRest(theta, left);
  return { theta, zeta, rest, count: left / rest };
}

/** The size of an eigenvalue beyond those found: half the smallest that the Krylov space has settled. */
function typicalRest(theta: Float64Array, left: number): number {
  const sorted = Float64Array.from(theta).sort();
  const settled = sorted[Math.ceil(0.3 * (sorted.length - 1))]!;
  return Math.max(Math.min(settled / 2, left), 1e-14);
}

/**
 * P(|w'u| > c √(u'MDKDMu)) for u ~ N(0, Ω): zz' − c²B has one positive eigenvalue p, and with the others −p μ_i the
 * probability is (2/π) ∫ Π (1 + μ_i / sin²φ)^(−1/2) dφ. The product over all but p follows from
 * det(I − x(zz' − c²B)) = Π(1 + xc²θ_i) · (1 − x Σ ζ_i/(1 + xc²θ_i)).
 */
export function missProbability(c: number, spectrum: DependentSpectrum): number {
  const { theta, zeta, rest, count } = spectrum;
  const positive = positiveEigenvalue(c, spectrum);
  if (positive <= 0) return 0;
  const { inverseSineSquared, weights } = craigNodes;
  let total = 0;
  for (let node = 0; node < weights.length; node++) {
    const s = inverseSineSquared[node]!;
    const x = s / positive;
    let logarithm = count * Math.log1p(x * c * c * rest);
    let product = 1;
    let excess = -1;
    for (let i = 0; i < theta.length; i++) {
      const pivot = 1 + x * c * c * theta[i]!;
      product *= pivot;
      excess += (x * zeta[i]!) / pivot;
      if (product > 1e280) {
        logarithm += Math.log(product);
        product = 1;
      }
    }
    total += weights[node]! * Math.exp(-logarithm / 2) * Math.sqrt((s - 1) / (product * excess));
  }
  return Math.min(1, total);
}

/** The root p > 0 of Σ ζ_i / (p + c²θ_i) = 1; the sum falls in p, by Newton's rule on its reciprocal. */
function positiveEigenvalue(c: number, { theta, zeta }: DependentSpectrum): number {
  let low = 0;
  let high = 0;
  for (const value of zeta) high += value;
  let p = high;
  for (let step = 0; step < 100; step++) {
    let sum = 0;
    let slope = 0;
    for (let i = 0; i < theta.length; i++) {
      const share = zeta[i]! / (p + c * c * theta[i]!);
      sum += share;
      slope -= share / (p + c * c * theta[i]!);
    }
    if (sum > 1) low = p;
    else high = p;
    let next = p + (sum * (1 - sum)) / slope;
    if (!(next > low && next < high)) next = (low + high) / 2;
    if (Math.abs(next - p) <= 4e-16 * p || high < 1e-300) return next;
    p = next;
  }
  return p;
}
