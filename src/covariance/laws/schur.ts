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

/** z'S⁻¹z for a positive definite q×q matrix, column-major; it is overwritten. Infinite when a pivot vanishes. */
export function quadratic(S: Float64Array, z: Float64Array, q: number): number {
  let sum = 0;
  for (let p = 0; p < q; p++) {
    const pivot = S[p * q + p]!;
    if (!(pivot > 0)) return Number.POSITIVE_INFINITY;
    sum += (z[p]! * z[p]!) / pivot;
    for (let i = p + 1; i < q; i++) {
      const factor = S[p * q + i]! / pivot;
      z[i]! -= factor * z[p]!;
      for (let j = p + 1; j < q; j++) S[j * q + i]! -= factor * S[j * q + p]!;
    }
  }
  return sum;
}
