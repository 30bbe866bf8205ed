/** What the draws take from a generator. */
export interface Source {
  uniform(): number;
  normal(): number;
}

/**
 * A χ² draw with real ν ≥ 1 degrees of freedom: twice a gamma draw of shape ν/2, by the squeeze of Marsaglia and
 * Tsang (2000), with one more power for shapes below 1.
 */
export function chiSquaredDraw(source: Source, df: number): number {
  const shape = df / 2;
  if (shape < 1) return chiSquaredDraw(source, df + 2) * (1 - source.uniform()) ** (1 / shape);
  const d = shape - 1 / 3;
  const c = 1 / Math.sqrt(9 * d);
  for (;;) {
    const x = source.normal();
    const v = (1 + c * x) ** 3;
    if (v <= 0) continue;
    const u = 1 - source.uniform();
    if (Math.log(u) < (x * x) / 2 + d - d * v + d * Math.log(v)) return 2 * d * v;
  }
}
