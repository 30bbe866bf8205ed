/** The size of residuals in one stretch of rows. */
export interface Scale {
  /** Middle of the stretch: a period, or a fitted value. */
  readonly at: number;
  /** Root mean square of the residuals in it. */
  readonly size: number;
  readonly n: number;
}

/** Root mean square of `residuals` in up to `blocks` stretches of equal numbers of rows, ordered by `by`. */
export function scaleBy(residuals: Float64Array, by: Float64Array, blocks = 20): Scale[] {
  const T = residuals.length;
  const rows = Array.from({ length: T }, (_, t) => t).sort((a, b) => by[a]! - by[b]! || a - b);
  const count = Math.max(1, Math.min(blocks, Math.floor(T / 5)));
  return Array.from({ length: count }, (_, i) => {
    const stretch = rows.slice(Math.floor((i * T) / count), Math.floor(((i + 1) * T) / count));
    const square = stretch.reduce((sum, t) => sum + residuals[t]! ** 2, 0);
    const at = (by[stretch[0]!]! + by[stretch[stretch.length - 1]!]!) / 2;
    return { at, size: Math.sqrt(square / stretch.length), n: stretch.length };
  });
}
