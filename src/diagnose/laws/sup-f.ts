import { gaussLegendre, logGamma } from "../../numeric/index.js";

/** −ζ(½)/√(2π): how far a sup over a grid falls short of one over a continuum, in steps (Siegmund 1985). */
const gridShift = 0.5825971579390106;

/**
 * P(sup ‖B(π)‖²/(π(1−π)) > x) over a log-odds range of `range` for a k-dimensional Brownian bridge B: the limit law of the
 * largest Wald statistic for one break at an unknown date (Andrews 1993), for stationary terms.
 *
 * In log-odds time the statistic is a stationary squared radial Ornstein–Uhlenbeck process; its survival below x is a
 * sum Σ Cᵢ exp(−μᵢ·range) over the roots μᵢ of ₁F₁(−μ; k/2; x/2) = 0. With `steps` dates searched instead of a
 * continuum, x is first moved to (√x + 0.5826√(range/steps))².
 */
export function supWaldUpper(x: number, k: number, range: number, steps?: number): number {
  if (!(x > 0)) return 1;
  if (!(range > 0)) return Number.NaN;
  const shifted = steps === undefined ? x : (Math.sqrt(x) + gridShift * Math.sqrt(range / steps)) ** 2;
  const quick = shifted > k ? tail(shifted, k, range) : 1;
  if (quick < 1e-9) return quick;
  const survival = (count: number) =>
    roots(k, shifted, count).reduce((sum, mu) => sum + weight(mu, k, shifted) * Math.exp(-mu * range), 0);
  const p = 1 - survival(2);
  if (p < 0.4) return Math.max(0, p);
  return Math.min(1, Math.max(0, 1 - survival(6)));
}

/**
 * Far tail x^{k/2} e^{−x/2} [(1 − k/x)·range + 2/x] / (2^{k/2} Γ(k/2)) (DeLong 1981, from memory), where 1 − survival
 * has no digits left.
 */
function tail(x: number, k: number, range: number): number {
  const density = Math.exp((k / 2) * Math.log(x / 2) - x / 2 - logGamma(k / 2));
  return density * ((1 - k / x) * range + 2 / x);
}

/** ₁F₁(a; b; z) by its series: here z ≥ 0 and a > −10, which loses few digits. */
function confluent(a: number, b: number, z: number): number {
  let term = 1;
  let sum = 1;
  for (let n = 0; n < 5000; n++) {
    term *= ((a + n) / (b + n)) * (z / (n + 1));
    sum += term;
    if (n > z && Math.abs(term) < 1e-17 * Math.abs(sum)) break;
    if (term === 0) break;
  }
  return sum;
}

function roots(k: number, x: number, count: number): number[] {
  const f = (mu: number) => confluent(-mu, k / 2, x / 2);
  const found: number[] = [];
  let low = 1e-14;
  let at = f(low);
  // the smallest root can be far below the scan's step, so the scan starts geometrically
  for (let high = 1e-13; found.length < count && high < 60; ) {
    const value = f(high);
    if (at * value <= 0) found.push(bisect(f, low, high));
    low = high;
    at = value;
    high = high < 0.02 ? high * 4 : high + 0.02;
  }
  return found;
}

function bisect(f: (mu: number) => number, low: number, high: number): number {
  const side = Math.sign(f(low));
  for (let i = 0; i < 200 && high - low > 1e-16 * high; i++) {
    const middle = (low + high) / 2;
    if (Math.sign(f(middle)) === side) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** (∫₀ˣ f w)² / ∫₀ˣ f² w with f(y) = ₁F₁(−μ; k/2; y/2) and w the χ²(k) density, by y = v². */
function weight(mu: number, k: number, x: number): number {
  const { nodes, weights } = gaussLegendre(64, 0, Math.sqrt(x));
  const log = (k / 2) * Math.LN2 + logGamma(k / 2);
  let first = 0;
  let second = 0;
  for (let i = 0; i < nodes.length; i++) {
    const v = nodes[i]!;
    const density = 2 * Math.exp((k - 1) * Math.log(v) - (v * v) / 2 - log) * weights[i]!;
    const f = confluent(-mu, k / 2, (v * v) / 2);
    first += f * density;
    second += f * f * density;
  }
  return (first * first) / second;
}

/** The log-odds range ln[π_hi(1−π_lo) / (π_lo(1−π_hi))] of break fractions searched. */
export function logOddsRange(low: number, high: number): number {
  return Math.log((high * (1 - low)) / (low * (1 - high)));
}
