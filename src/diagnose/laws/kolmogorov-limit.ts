import { brentRoot } from "../../numeric/index.js";

/** P(sup |B| > z) for a Brownian bridge B: 2 Σ (−1)^{j−1} exp(−2j²z²), or its theta form where that converges slowly. */
export function kolmogorovLimitUpper(z: number): number {
  if (!(z > 0)) return 1;
  if (z < 1) {
    let sum = 0;
    for (let j = 1; j < 50; j++) sum += Math.exp((-((2 * j - 1) ** 2) * Math.PI ** 2) / (8 * z * z));
    return 1 - (Math.sqrt(2 * Math.PI) / z) * sum;
  }
  let sum = 0;
  for (let j = 1; j < 50; j++) sum += (j % 2 === 1 ? 2 : -2) * Math.exp(-2 * j * j * z * z);
  return sum;
}

/** The z with that probability `p`. */
export function kolmogorovPoint(p: number): number {
  return brentRoot((z) => kolmogorovLimitUpper(z) - p, 0.2, 8, 1e-12);
}
