/** A correlation at one lag. */
export interface LagCorrelation {
  readonly lag: number;
  readonly value: number;
}

/** A series on the whole time axis, centred at its mean, zero where it is missing (Parzen 1963). */
export function centred(values: Float64Array): Float64Array {
  let sum = 0;
  let count = 0;
  for (const value of values) {
    if (Number.isNaN(value)) continue;
    sum += value;
    count++;
  }
  const mean = count > 0 ? sum / count : 0;
  return values.map((value) => (Number.isNaN(value) ? 0 : value - mean));
}

/** Autocorrelations of a centred series at lags 1..most, divisor T. */
export function autocorrelations(x: Float64Array, most: number): LagCorrelation[] {
  const scale = productAt(x, x, 0);
  return Array.from({ length: most }, (_, i) => ({ lag: i + 1, value: productAt(x, x, i + 1) / scale }));
}

/**
 * Correlations of y in period t with x in period t − lag, for lags −most..most: a peak at a positive lag says that x
 * runs ahead of y.
 */
export function crossCorrelations(x: Float64Array, y: Float64Array, most: number): LagCorrelation[] {
  const scale = Math.sqrt(productAt(x, x, 0) * productAt(y, y, 0));
  return Array.from({ length: 2 * most + 1 }, (_, i) => {
    const lag = i - most;
    const product = lag >= 0 ? productAt(y, x, lag) : productAt(x, y, -lag);
    return { lag, value: product / scale };
  });
}

/**
 * T times the variance of a correlation of two unrelated series at any one lag, from their autocorrelations:
 * 1 + 2 Σ r_x(j) r_y(j) (Bartlett 1946, Supplement to JRSS 8; from memory), at least that of series without memory.
 */
export function varianceOfUnrelated(x: readonly LagCorrelation[], y: readonly LagCorrelation[]): number {
  let sum = 1;
  for (let i = 0; i < Math.min(x.length, y.length); i++) sum += 2 * x[i]!.value * y[i]!.value;
  return Math.max(1, sum);
}

/** Σ a_t b_{t−lag}. */
function productAt(a: Float64Array, b: Float64Array, lag: number): number {
  let sum = 0;
  for (let t = lag; t < a.length; t++) sum += a[t]! * b[t - lag]!;
  return sum;
}
