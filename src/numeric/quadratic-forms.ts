import { alongContour } from "./contour.js";
import { brentMinimum } from "./minimum.js";

/**
 * P(|Z| > c √Q) for Q = Σ λ_i χ²₁ with λ_i ≥ 0, independent of Z ~ N(0, 1): Craig's (1991) finite-range form of the
 * normal tail averaged over Q,
 *
 *   (2/π) ∫₀^{π/2} Π (1 + c² λ_i / sin²φ)^(−1/2) dφ,
 *
 * with sin φ = 1/cosh v, which moves every singularity to a distance π/2 from the real line, so that the trapezoid rule
 * converges geometrically whatever the weights. Every term is positive: about 13 digits, also far out. λ_i = 1/ν, ν
 * times, gives Student's t with ν degrees of freedom.
 */
export function craigTail(c: number, lambdas: ArrayLike<number>): number {
  const square = c * c;
  let curvature = 1;
  for (let i = 0; i < lambdas.length; i++) {
    const part = square * lambdas[i]!;
    curvature += part / (1 + part);
  }
  const value = (v: number) => {
    const cosh = Math.cosh(v);
    let logs = 0;
    for (let i = 0; i < lambdas.length; i++) logs += Math.log1p(square * lambdas[i]! * cosh * cosh);
    return Math.exp(-logs / 2) / cosh;
  };
  let step = 1 / Math.sqrt(curvature);
  let sum = value(0) / 2;
  let reach = step;
  for (; reach < 50; reach += step) {
    const term = value(reach);
    sum += term;
    if (!(term > 1e-17 * sum)) break;
  }
  for (let halving = 0; halving < 4; halving++) {
    const before = sum * step;
    for (let v = step / 2; v < reach; v += step) sum += value(v);
    step /= 2;
    // Each halving squares the relative error.
    if (Math.abs(sum * step - before) <= 1e-8 * before) break;
  }
  return Math.min(1, (2 / Math.PI) * sum * step);
}

/**
 * P(Σ λ_i χ²₁ > x) for weights of either sign (the problem of Imhof 1961): the moment generating function integrated along
 * a hyperbola through the saddle point that bends to where exp(−zx) falls. The smaller of both tails has about 12 digits
 * of its own, so for the lower tail of small probability ask for imhofUpper(−λ, −x).
 */
export function imhofUpper(lambdas: ArrayLike<number>, x = 0): number {
  const weights = Float64Array.from(lambdas).filter((value) => value !== 0);
  const most = weights.reduce((size, value) => Math.max(size, value), 0);
  const least = weights.reduce((size, value) => Math.min(size, value), 0);
  if (x >= 0 && most === 0) return 0;
  if (x <= 0 && least === 0) return x < 0 || most > 0 ? 1 : 0;
  const mean = weights.reduce((sum, value) => sum + value, 0);
  const side = x < mean ? -1 : 1;
  // The saddle point lies between zero and the nearest singularity, and where all terms on this side are bounded, before this.
  const bounded = side * x < 0 ? (1 + weights.length / 2) / Math.abs(x) : Number.POSITIVE_INFINITY;
  const limit = Math.min(1 / (2 * Math.max(side * (side > 0 ? most : least), 0)), bounded);
  const logMoment = (re: number, im: number): [number, number] => {
    let size = 0;
    let angle = 0;
    for (let i = 0; i < weights.length; i++) {
      const a = 1 - 2 * weights[i]! * re;
      const b = -2 * weights[i]! * im;
      size += Math.log(Math.hypot(a, b));
      angle += Math.atan2(b, a);
    }
    return [-size / 2 - re * x, -angle / 2 - im * x];
  };
  const at = (s: number) => (side * limit) / (1 + Math.exp(-s));
  const objective = (z: number) => logMoment(z, 0)[0] - Math.log(Math.abs(z));
  const centre = at(brentMinimum((s) => objective(at(s)), -40, 30, 1e-4).x);
  const nudge = 1e-3 * Math.min(Math.abs(centre), limit - Math.abs(centre));
  const curvature =
    (objective(centre + nudge) - 2 * objective(centre) + objective(centre - nudge)) / (nudge * nudge);
  const scale = curvature > 0 ? 1 / Math.sqrt(curvature) : Math.abs(centre);
  const tail = Math.abs(alongContour(logMoment, { centre, scale, tilt: 0.5 * Math.sign(x) }));
  return Math.min(1, side > 0 ? tail : 1 - tail);
}
