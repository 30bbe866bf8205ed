import type { Regression } from "../../estimate/index.js";
import { fisher, normal } from "../../numeric/index.js";

/** One point of a normal quantile plot. */
export interface QuantilePoint {
  /** What a normal law would have there. */
  readonly expected: number;
  /** The ordered residual, divided by s√(1−h). */
  readonly found: number;
  /** Pointwise band for it under normal errors. */
  readonly low: number;
  readonly high: number;
}

/**
 * Residuals divided by s√(1−h), in order, against normal quantiles at (i − ½)/T, with a pointwise band from the law of the
 * i-th of T ordered uniforms, Beta(i, T−i+1). At most `points` of them, evenly spaced in rank, both ends kept. Rows that
 * the terms fit exactly (h = 1) are left out.
 */
export function quantilePlot(m: Regression, level: number, points = 101): QuantilePoint[] {
  const s = Math.sqrt(m.rss / (m.T - m.k));
  const ordered: number[] = [];
  for (let t = 0; t < m.T; t++) {
    const rest = 1 - m.leverage[t]!;
    if (rest > 1e-10) ordered.push(m.residuals[t]! / (s * Math.sqrt(rest)));
  }
  ordered.sort((a, b) => a - b);
  const n = ordered.length;
  const shown = Math.min(n, points);
  const ranks = Array.from({ length: shown }, (_, i) =>
    shown === 1 ? 1 : 1 + Math.round((i * (n - 1)) / (shown - 1)),
  );
  const tail = (1 - level) / 2;
  // the band is symmetric: the upper end at rank i is minus the lower one at rank n + 1 − i
  const lower = new Map<number, number>();
  const low = (i: number) => {
    let value = lower.get(i);
    if (value === undefined) {
      value = normal.quantile(orderedUniform(tail, i, n));
      lower.set(i, value);
    }
    return value;
  };
  return ranks.map((i) => ({
    expected: normal.quantile((i - 0.5) / n),
    found: ordered[i - 1]!,
    low: low(i),
    high: -low(n + 1 - i),
  }));
}

/** Quantile of the i-th smallest of n uniforms, by way of the F law. */
function orderedUniform(p: number, i: number, n: number): number {
  const a = i;
  const b = n - i + 1;
  const ratio = (a / b) * fisher.quantile(p, 2 * a, 2 * b);
  return ratio / (1 + ratio);
}
