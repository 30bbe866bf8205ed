import type { Scores } from "../scores.js";
import { dotAt } from "../shape/vectors.js";

const SEGMENTS = 256;
const known = new WeakMap<Scores, readonly Float64Array[]>();

/**
 * How far a contrast's design is from what the limit of fixed-b theory asks, second moments that grow evenly over
 * the sample: the largest ‖Σ_{t ≤ rT} w_t q_t − r Σ w_t q_t‖ over 256 values of r, w of unit length and q_t the rows of an
 * orthonormal basis. Zero for a constant, near 0.19 for the slope of a linear trend, of order T^(−1/2) for
 * stationary regressors. One pass over the basis serves all contrasts, since w = Qa.
 */
export function unevenness(scores: Scores, contrast: Float64Array): number {
  const { back, k } = scores;
  const a = new Float64Array(k);
  for (let j = 0; j < k; j++) for (let i = 0; i < k; i++) a[j]! += back.data[j * k + i]! * contrast[i]!;
  let parts = known.get(scores);
  if (!parts) {
    parts = departures(scores);
    known.set(scores, parts);
  }
  let worst = 0;
  for (const part of parts) {
    let distance = 0;
    for (let i = 0; i < k; i++) {
      let sum = 0;
      for (let j = 0; j < k; j++) sum += part[j * k + i]! * a[j]!;
      distance += sum * sum;
    }
    worst = Math.max(worst, distance);
  }
  return Math.sqrt(worst / dotAt(a, 0, a, 0, k));
}

/** Σ_{t ≤ rT} q_t q_t' − r Σ q_t q_t' at the end of every segment. */
function departures({ basis, span, k }: Scores): Float64Array[] {
  const segments = Math.min(SEGMENTS, span);
  const edge = (s: number): number => Math.floor((s * span) / segments);
  const running = new Float64Array(k * k);
  const parts: Float64Array[] = [];
  for (let s = 0; s < segments; s++) {
    const from = edge(s);
    const length = edge(s + 1) - from;
    for (let j = 0; j < k; j++) {
      for (let i = 0; i <= j; i++) {
        const sum = dotAt(basis.data, i * span + from, basis.data, j * span + from, length);
        running[j * k + i]! += sum;
        if (i !== j) running[i * k + j]! += sum;
      }
    }
    parts.push(running.slice());
  }
  parts.forEach((part, s) => {
    const r = edge(s + 1) / span;
    for (let i = 0; i < part.length; i++) part[i]! -= r * running[i]!;
  });
  return parts;
}
