import assert from "node:assert/strict";

/** Digits that agree: −log10 of the relative error (of the absolute one where the value wanted is zero), at most 16. */
export function digits(found: number, wanted: number): number {
  if (found === wanted) return 16;
  const error = wanted === 0 ? Math.abs(found) : Math.abs(found - wanted) / Math.abs(wanted);
  return Math.min(16, -Math.log10(error));
}

/** Asserts that every pair agrees to at least so many digits. */
export function agree(
  found: ArrayLike<number>,
  wanted: ArrayLike<number>,
  least: number,
  what = "value",
): void {
  assert.equal(found.length, wanted.length, `${what}: number of values`);
  for (let i = 0; i < wanted.length; i++) {
    const agreed = digits(found[i]!, wanted[i]!);
    assert.ok(
      agreed >= least,
      `${what} ${i}: ${found[i]} against ${wanted[i]}, ${agreed.toFixed(1)} digits of ${least}`,
    );
  }
}
