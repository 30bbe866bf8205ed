/**
 * 1 / (S⁻¹)_11 of a positive definite q×q matrix given by its lower triangle, column-major; the triangle is
 * overwritten. Elimination from the last row up leaves the first pivot as what is asked.
 */
export function schurFirst(S: Float64Array, q: number): number {
  for (let p = q - 1; p > 0; p--) {
    const pivot = S[p * q + p]!;
    if (!(pivot > 0)) return 0;
    for (let j = 0; j < p; j++) {
      const factor = S[j * q + p]! / pivot;
      for (let i = j; i < p; i++) S[j * q + i]! -= factor * S[i * q + p]!;
    }
  }
  return S[0]!;
}
