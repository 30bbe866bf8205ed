/** A column less its mean, scaled to a mean square of one; undefined where it does not vary. */
export function standardised(column: Float64Array): Float64Array | undefined {
  const n = column.length;
  let largest = 0;
  for (const x of column) largest = Math.max(largest, Math.abs(x));
  if (largest === 0) return undefined;
  const mean = column.reduce((sum, x) => sum + x / largest, 0) / n;
  const rest = column.map((x) => x / largest - mean);
  const size = Math.sqrt(rest.reduce((sum, x) => sum + x * x, 0) / n);
  return size <= n * 2 ** -52 ? undefined : rest.map((x) => x / size);
}
