import { gaussLegendre } from "../../numeric/index.js";
import type { Spectrum } from "./spectrum.js";

const NODES = 40;
const nodes = gaussLegendre(NODES, 0, 1);
/** φ = πx²/2 puts nodes where the integrand turns when c is small. */
const angle = (x: number): number => (Math.PI / 2) * x * x;

/** 1/sin²φ and (2/π)·weight of the nodes φ in (0, π/2). */
export const craigNodes = {
  inverseSineSquared: Float64Array.from(nodes.nodes, (x) => 1 / Math.sin(angle(x)) ** 2),
  weights: Float64Array.from(nodes.weights, (weight, i) => 2 * nodes.nodes[i]! * weight),
};

/**
 * P(|Z| > c √Q) for a standard normal Z and an independent Q = Σ λ_i χ²_1: Craig's finite-range form of the normal
 * tail, averaged over Q,
 *
 *   (2/π) ∫₀^{π/2} Π_i (1 + c² λ_i / sin²φ)^(−1/2) dφ,
 *
 * by 40 Gauss–Legendre nodes. Equal λ_i = 1/ν give the t law with ν from 1 to 1,000 degrees of freedom to 1e-11
 * (1e-6 where p is near 1); relative accuracy is kept far out, since every term is positive.
 */
export function quadraticTail(c: number, { leading, rest }: Spectrum): number {
  const { inverseSineSquared, weights } = craigNodes;
  let total = 0;
  for (let i = 0; i < NODES; i++) {
    const a = c * c * inverseSineSquared[i]!;
    let product = 1;
    let logarithm = 0;
    for (let j = 0; j < rest.length; j++) logarithm += rest[j]!.count * Math.log1p(a * rest[j]!.value);
    for (let j = 0; j < leading.length; j++) {
      product *= 1 + a * leading[j]!;
      if (product > 1e280) {
        logarithm += Math.log(product);
        product = 1;
      }
    }
    total +=
      weights[i]! *
      (logarithm === 0 ? 1 / Math.sqrt(product) : Math.exp(-logarithm / 2) / Math.sqrt(product));
  }
  return Math.min(1, total);
}

/**
 * The c at which a decreasing tail probability equals `alpha`, by the secant rule on its logarithm, which is nearly
 * linear in c; bisection takes over where the rule leaves the bracket.
 */
export function criticalValue(tail: (c: number) => number, alpha: number, start = 2): number {
  const goal = Math.log(alpha);
  const gap = (c: number): number => Math.log(tail(c)) - goal;
  let low = 0;
  let high = Number.POSITIVE_INFINITY;
  let c = start;
  let previous = Number.NaN;
  let previousGap = Number.NaN;
  for (let step = 0; step < 200; step++) {
    const g = gap(c);
    if (g === 0) return c;
    if (g > 0) low = c;
    else high = c;
    let next = Number.isNaN(previous) ? c + g / (c + 0.4) : c - (g * (c - previous)) / (g - previousGap);
    if (!(next > low && next < high)) next = high === Number.POSITIVE_INFINITY ? 2 * c : (low + high) / 2;
    if (Math.abs(next - c) <= 1e-11 * next) return next;
    previous = c;
    previousGap = g;
    c = next;
  }
  return c;
}
