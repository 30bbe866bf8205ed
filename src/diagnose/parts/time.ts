/** Whether some neighbouring rows are more than one period apart. */
export function hasGaps(periods: Float64Array): boolean {
  return missingPeriods(periods) > 0;
}

/** How many periods between the first row and the last have no row. */
export function missingPeriods(periods: Float64Array): number {
  if (periods.length === 0) return 0;
  return periods[periods.length - 1]! - periods[0]! + 1 - periods.length;
}

/** For each row the row that stands `lag` ≥ 1 periods earlier in time, −1 where there is none. */
export function rowsEarlier(periods: Float64Array, lag: number): Int32Array {
  const rows = new Int32Array(periods.length).fill(-1);
  if (!hasGaps(periods)) {
    for (let t = lag; t < rows.length; t++) rows[t] = t - lag;
    return rows;
  }
  let candidate = 0;
  for (let t = 0; t < rows.length; t++) {
    const wanted = periods[t]! - lag;
    while (periods[candidate]! < wanted) candidate++;
    if (periods[candidate] === wanted) rows[t] = candidate;
  }
  return rows;
}

/** `values` as they stood `lag` periods earlier, zero where that period has no row. */
export function lagged(values: Float64Array, periods: Float64Array, lag: number): Float64Array {
  const result = new Float64Array(values.length);
  const rows = rowsEarlier(periods, lag);
  for (let t = 0; t < rows.length; t++) if (rows[t]! >= 0) result[t] = values[rows[t]!]!;
  return result;
}

/** Sum of products of `a` with `b` `lag` periods earlier, and the number of pairs in it. */
export function laggedProducts(
  a: Float64Array,
  b: Float64Array,
  periods: Float64Array,
  lag: number,
): { sum: number; pairs: number } {
  let sum = 0;
  if (!hasGaps(periods)) {
    for (let t = lag; t < a.length; t++) sum += a[t]! * b[t - lag]!;
    return { sum, pairs: Math.max(a.length - lag, 0) };
  }
  let pairs = 0;
  const rows = rowsEarlier(periods, lag);
  for (let t = 0; t < rows.length; t++) {
    if (rows[t]! < 0) continue;
    sum += a[t]! * b[rows[t]!]!;
    pairs++;
  }
  return { sum, pairs };
}
