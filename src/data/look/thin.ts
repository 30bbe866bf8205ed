/** A stretch of neighbouring periods of one series, as a chart draws it. */
export interface Bin {
  /** First and last ordinal of the stretch, both included. */
  readonly first: number;
  readonly last: number;
  /** Smallest, mean and largest value; NaN where every value is missing. */
  readonly low: number;
  readonly mean: number;
  readonly high: number;
  /** Number of values that are there. */
  readonly count: number;
}

/**
 * A series in at most `most` stretches of equal length: its periods one by one when they are few enough, else the
 * range and mean of each stretch, so that no extreme is lost. `values` stands on the whole time axis from `first` on,
 * missing periods as NaN.
 */
export function thin(values: Float64Array, first: number, most: number): Bin[] {
  const length = Math.ceil(values.length / most);
  const bins: Bin[] = [];
  for (let start = 0; start < values.length; start += length) {
    const end = Math.min(values.length, start + length);
    let low = Number.POSITIVE_INFINITY;
    let high = Number.NEGATIVE_INFINITY;
    let sum = 0;
    let count = 0;
    for (let i = start; i < end; i++) {
      const value = values[i]!;
      if (Number.isNaN(value)) continue;
      if (value < low) low = value;
      if (value > high) high = value;
      sum += value;
      count++;
    }
    const none = count === 0;
    bins.push({
      first: first + start,
      last: first + end - 1,
      low: none ? Number.NaN : low,
      mean: none ? Number.NaN : sum / count,
      high: none ? Number.NaN : high,
      count,
    });
  }
  return bins;
}
