/** Whether a column takes more than `n` different values. */
export function takesMoreThan(n: number, x: Float64Array): boolean {
  const seen = new Set<number>();
  for (const v of x) if (seen.add(v).size > n) return true;
  return false;
}
