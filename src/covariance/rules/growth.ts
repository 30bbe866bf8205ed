/** ⌈1.3 √T⌉ (Lazarus, Lewis, Stock and Watson 2018, Journal of Business & Economic Statistics 36; rounded up here). */
export function squareRootBandwidth(T: number): number {
  return Math.ceil(1.3 * Math.sqrt(T));
}

/** 0.75 T^(1/3): Andrews' Bartlett rule where the scores have an AR(1) coefficient of a quarter. */
export function cubeRootBandwidth(T: number): number {
  return 0.75 * Math.cbrt(T);
}

/** ⌊0.4 T^(2/3)⌋ cosines (Lazarus, Lewis, Stock and Watson 2018; rounded down here), at least 1 and at most T − k. */
export function cosineTerms(T: number, k: number): number {
  return Math.max(1, Math.min(T - k, Math.floor(0.4 * Math.cbrt(T) ** 2)));
}
