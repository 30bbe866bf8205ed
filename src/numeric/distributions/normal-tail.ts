const rootTwoPi = 2.50662827463100050241576528481;

/** P(Z > x) for a standard normal Z, relative error about 1e-15 as far as doubles reach. */
export function normalUpper(x: number): number {
  if (Number.isNaN(x)) return x;
  if (x < 0) return 1 - normalUpper(-x);
  if (x > 40) return 0;
  const density = normalDensity(x);
  return x < 1.5 ? 0.5 - density * series(x) : density / fraction(x);
}

/** The density with x² taken apart, so that its rounding does not enter the exponent. */
function normalDensity(x: number): number {
  const head = Math.trunc(16 * x) / 16;
  return (Math.exp((-head * head) / 2) * Math.exp((-(x - head) * (x + head)) / 2)) / rootTwoPi;
}

/** Σ x²ⁿ⁺¹ / (1·3·…·(2n + 1)) (Abramowitz and Stegun 1964, 26.2.11). */
function series(x: number): number {
  let term = x;
  let sum = x;
  for (let n = 3; term > 1e-17 * sum; n += 2) {
    term *= (x * x) / n;
    sum += term;
  }
  return sum;
}

/** x + 1/(x + 2/(x + 3/(x + ...))), Laplace's continued fraction (26.2.14), from far enough inside out. */
function fraction(x: number): number {
  let value = x;
  for (let n = Math.ceil(10 + 320 / (x * x)); n > 0; n--) value = x + n / value;
  return value;
}
