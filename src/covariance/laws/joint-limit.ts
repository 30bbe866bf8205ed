import { counterRandom } from "../../numeric/index.js";
import type { Kernel } from "../kernels.js";
import { chiSquaredDraw } from "./gamma.js";
import { limitOf } from "./limit.js";
import { schurFirst } from "./schur.js";
import type { Bundle } from "./spectrum.js";

const SEED = 20_250_103;
const cache = new Map<string, Float64Array>();
/** The spectrum is resolved for tails beyond this: smooth kernels have long joint tails, and few eigenvalues. */
const far = ({ order }: Kernel): number => (order === 1 ? 8 : 60);
/** Up to this many small eigenvalues are drawn singly. */
const SINGLE = 40;

/**
 * Draws of D = Q_11 − Q_12 Q_22⁻¹ Q_21 for Q = Σ λ_i ζ_i ζ_i' in q dimensions, λ_i those of the limit: by rotation every direction is
 * like the first. The many small eigenvalues come as one Wishart matrix. Kept per kernel, b and q.
 */
export function drawsInLimit(kernel: Kernel, b: number, q: number, count: number): Float64Array {
  const key = `${kernel.name} ${b} ${q} ${count}`;
  let draws = cache.get(key);
  if (!draws) {
    draws = draw(kernel, b, q, count);
    if (cache.size > 100) cache.clear();
    cache.set(key, draws);
  }
  return draws;
}

function draw(kernel: Kernel, b: number, q: number, count: number): Float64Array {
  const { leading, rest } = limitOf(kernel, b).spectrum(far(kernel), 1e-3);
  const lambda = [...leading];
  const wisharts: Bundle[] = [];
  for (const bundle of rest) {
    const pieces = Math.ceil(bundle.count);
    if (pieces > Math.max(SINGLE, 2 * q)) wisharts.push(bundle);
    else lambda.push(...new Array<number>(pieces).fill((bundle.value * bundle.count) / pieces));
  }
  const random = counterRandom(SEED, q);
  const zeta = new Float64Array(q);
  const Q = new Float64Array(q * q);
  const result = new Float64Array(count);
  for (let r = 0; r < count; r++) {
    Q.fill(0);
    for (const value of lambda) {
      random.fillNormal(zeta);
      for (let j = 0; j < q; j++) {
        const scaled = value * zeta[j]!;
        for (let i = j; i < q; i++) Q[j * q + i]! += scaled * zeta[i]!;
      }
    }
    for (const bundle of wisharts) addWishart(Q, q, bundle.count, bundle.value, random);
    result[r] = schurFirst(Q, q);
  }
  return result;
}

/** Q += factor · L L' for Bartlett's triangular L: χ of df, df − 1, ... on the diagonal, normals below. */
function addWishart(
  Q: Float64Array,
  q: number,
  df: number,
  factor: number,
  random: { uniform(): number; normal(): number },
): void {
  const L = new Float64Array(q * q);
  for (let j = 0; j < q; j++) {
    L[j * q + j] = Math.sqrt(chiSquaredDraw(random, df - j));
    for (let i = j + 1; i < q; i++) L[j * q + i] = random.normal();
  }
  for (let j = 0; j < q; j++) {
    for (let i = j; i < q; i++) {
      let sum = 0;
      for (let l = 0; l <= j; l++) sum += L[l * q + i]! * L[l * q + j]!;
      Q[j * q + i]! += factor * sum;
    }
  }
}
