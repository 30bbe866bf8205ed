/**
 * Holm's (1979) adjusted p-values: the i-th smallest of n times n−i+1, made monotone and capped at one. What is NaN
 * stays NaN and does not count.
 */
export function holm(p: readonly number[]): number[] {
  const order = p
    .map((_, i) => i)
    .filter((i) => !Number.isNaN(p[i]!))
    .sort((a, b) => p[a]! - p[b]!);
  const adjusted = p.map(() => Number.NaN);
  let largest = 0;
  order.forEach((at, i) => {
    largest = Math.max(largest, Math.min(1, p[at]! * (order.length - i)));
    adjusted[at] = largest;
  });
  return adjusted;
}
