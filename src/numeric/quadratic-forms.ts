import { gaussLegendre } from "./quadrature.js";

/**
 * P(|Z| > c √Q) for Q = Σ λ_i χ²₁ with λ_i ≥ 0, independent of Z ~ N(0, 1): Craig's (1991) finite-range form of
 * the normal tail, integrated against the moment generating function of Q with 48 Gauss–Legendre nodes. Keeps
 * relative accuracy far into the tail; λ_i = 1/ν, ν times, gives Student's t with ν degrees of freedom.
 */
export function craigTail(c: number, lambdas: ArrayLike<number>): number {
  const { nodes, weights } = gaussLegendre(48, 0, Math.PI / 2);
  let sum = 0;
  for (let i = 0; i < nodes.length; i++) {
    const a = (c / Math.sin(nodes[i]!)) ** 2;
    let logs = 0;
    for (let j = 0; j < lambdas.length; j++) logs += Math.log1p(a * lambdas[j]!);
    sum += weights[i]! * Math.exp(-logs / 2);
  }
  return (2 / Math.PI) * sum;
}

/**
 * P(Σ λ_i χ²₁ > x) for weights of either sign: Imhof's (1961) integral. With x = 0 on a logarithmic scale by the
 * trapezoid rule, which converges geometrically there; otherwise by Gauss–Legendre panels no longer than a period.
 * Absolute error about 1e-10.
 */
export function imhofUpper(lambdas: ArrayLike<number>, x = 0): number {
  let largest = 0;
  for (let i = 0; i < lambdas.length; i++) largest = Math.max(largest, Math.abs(lambdas[i]!));
  if (largest === 0) return x < 0 ? 1 : 0;
  const scaled = Float64Array.from(lambdas, (value) => value / largest).filter(
    (value) => Math.abs(value) > 1e-14,
  );
  const level = x / largest;
  const integral = level === 0 ? logarithmicIntegral(scaled) : panelledIntegral(scaled, level);
  return Math.min(1, Math.max(0, 0.5 + integral / Math.PI));
}

/** sin θ(s) / (s ρ(s)), and ρ itself. */
function integrand(lambdas: Float64Array, x: number, s: number): { value: number; rho: number } {
  let theta = 0;
  let logRho = 0;
  for (let i = 0; i < lambdas.length; i++) {
    const part = lambdas[i]! * s;
    theta += Math.atan(part);
    logRho += Math.log1p(part * part);
  }
  const rho = Math.exp(logRho / 4);
  return { value: Math.sin(theta / 2 - (x * s) / 2) / (s * rho), rho };
}

function logarithmicIntegral(lambdas: Float64Array): number {
  const step = 0.1;
  let sum = 0;
  for (let v = -30; v < 400; v += step) {
    const s = Math.exp(v);
    const { value, rho } = integrand(lambdas, 0, s);
    sum += value * s;
    if (rho > 1e13) break;
  }
  return sum * step;
}

function panelledIntegral(lambdas: Float64Array, x: number): number {
  const width = Math.min(1, (2 * Math.PI) / Math.abs(x));
  const { nodes, weights } = gaussLegendre(16, 0, 1);
  let sum = 0;
  for (let panel = 0; panel < 200_000; panel++) {
    // Panels grow once the phase of the weights has settled, but never beyond one period of the term in x.
    let part = 0;
    let rho = 1;
    for (let i = 0; i < nodes.length; i++) {
      const at = integrand(lambdas, x, (panel + nodes[i]!) * width);
      part += weights[i]! * at.value;
      rho = at.rho;
    }
    sum += part * width;
    if (1 / (rho * (panel + 1) * width * Math.abs(x)) < 1e-12 && panel > 4) break;
  }
  return sum;
}
