/**
 * For strictly increasing ordinals: the row (0-based) that stands `by` periods before a row. −1 outside the table's
 * span, −2 in a gap.
 */
export function rowsByPeriod(ordinals: Float64Array): (row: number, by: number) => number {
  const T = ordinals.length;
  const first = ordinals[0]!;
  const last = ordinals[T - 1]!;
  if (last - first === T - 1) {
    return (row, by) => {
      const source = row - by;
      return source < 0 || source >= T ? -1 : source;
    };
  }
  const rows = new Map<number, number>();
  for (let row = 0; row < T; row++) rows.set(ordinals[row]!, row);
  return (row, by) => {
    const ordinal = ordinals[row]! - by;
    return rows.get(ordinal) ?? (ordinal < first || ordinal > last ? -1 : -2);
  };
}
