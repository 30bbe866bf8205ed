const halfLogTwoPi = 0.918938533204672741780329736406;

/** log Γ(n + 1) − (n + ½) log n + n − ½ log 2π: what Stirling's formula leaves, for n > 0. Absolute error about 1e-16. */
export function stirlingRest(n: number): number {
  let sum = 0;
  let at = n;
  // The recursion rest(n) = rest(n + 1) + (n + ½) log(1 + 1/n) − 1 up to where the series holds.
  for (; at < 15; at++) sum += (at + 0.5) * Math.log1p(1 / at) - 1;
  const s = 1 / (at * at);
  const series =
    1 / 12 - s * (1 / 360 - s * (1 / 1260 - s * (1 / 1680 - s * (1 / 1188 - s * (691 / 360360 - s / 156)))));
  return sum + series / at;
}

/** x log(x/m) + m − x for x, m > 0, without cancellation where x is near m (Loader 2000). */
export function deviance(x: number, m: number): number {
  const difference = x - m;
  if (Math.abs(difference) >= 0.1 * (x + m)) return x * Math.log(x / m) - difference;
  const v = difference / (x + m);
  let power = 2 * x * v;
  let sum = difference * v;
  for (let j = 3; ; j += 2) {
    power *= v * v;
    const next = sum + power / j;
    if (next === sum) return sum;
    sum = next;
  }
}

/** Natural logarithm of the gamma function for x > 0. Absolute error about 1e-15 times its size or one, if that is more. */
export function logGamma(x: number): number {
  return (x + 0.5) * Math.log(x) - x + halfLogTwoPi + stirlingRest(x) - Math.log(x);
}
