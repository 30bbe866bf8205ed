import { columnOf } from "../../numeric/index.js";
import type { ContrastDesign } from "./design.js";

const SEGMENTS = 256;
/**
 * How far a contrast's design is from what the limit of fixed-b theory asks, second moments that grow evenly over
 * the sample: the largest ‖Σ_{t ≤ rT} w_t q_t − r Σ w_t q_t‖ over 256 values of r, w of unit length and q_t the rows of an
 * orthonormal basis. Zero for a constant, near 0.19 for the slope of a linear trend, of order T^(−1/2) for
 * stationary regressors.
 */
export function unevenness({ weights, basis }: ContrastDesign): number {
  const n = weights.length;
  const segments = Math.min(SEGMENTS, n);
  const distances = new Float64Array(segments);
  const partial = new Float64Array(segments);
  for (let j = 0; j < basis.columns; j++) {
    const q = columnOf(basis, j);
    let sum = 0;
    let t = 0;
    for (let s = 0; s < segments; s++) {
      for (const end = edge(s, segments, n); t < end; t++) sum += weights[t]! * q[t]!;
      partial[s] = sum;
    }
    for (let s = 0; s < segments; s++) {
      distances[s]! += (partial[s]! - (edge(s, segments, n) / n) * sum) ** 2;
    }
  }
  return Math.sqrt(Math.max(...distances));
}

/** The first row after segment s. */
function edge(s: number, segments: number, n: number): number {
  return Math.floor(((s + 1) * n) / segments);
}
