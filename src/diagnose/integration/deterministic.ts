/** Deterministic terms beside the lagged level: none, a constant, a constant and a linear trend. */
export type Deterministic = "none" | "constant" | "trend";

/** Columns of the deterministic terms for n periods: ones, and a trend centred and scaled to ±1. */
export function deterministicColumns(kind: Deterministic, n: number): Float64Array[] {
  if (kind === "none") return [];
  const constant = new Float64Array(n).fill(1);
  if (kind === "constant") return [constant];
  const middle = (n - 1) / 2;
  return [constant, Float64Array.from({ length: n }, (_, t) => (n > 1 ? (t - middle) / middle : 0))];
}
