/**
 * The x ≥ 0 at which a decreasing tail probability equals p, by bisection in log x and then the secant of log
 * tail against log x: exact to about the last digits of the tail itself.
 */
export function tailQuantile(tail: (x: number) => number, p: number): number {
  if (Number.isNaN(p) || p < 0 || p > 1) return Number.NaN;
  if (p === 0) return Number.POSITIVE_INFINITY;
  if (p >= tail(0)) return 0;
  if (tail(1e300) > p) return Number.POSITIVE_INFINITY;
  let low = 1e-300;
  let high = 1;
  while (tail(high) > p && high < 1e300) {
    low = high;
    high *= 4;
  }
  if (high === 1) {
    low = 0.25;
    while (tail(low) < p && low > 1e-300) {
      high = low;
      low /= 4;
    }
  }
  const target = Math.log(p);
  let fLow = Math.log(tail(low)) - target;
  let fHigh = Math.log(tail(high)) - target;
  for (let step = 0; step < 200; step++) {
    const width = high - low;
    if (width <= 2 * Number.EPSILON * high) break;
    // Illinois' false position, with a bisection now and then to guarantee progress.
    let x = step % 4 === 3 ? low + width / 2 : low + (width * fLow) / (fLow - fHigh);
    if (!(x > low && x < high)) x = low + width / 2;
    const f = Math.log(tail(x)) - target;
    if (f === 0) return x;
    if (f > 0) {
      low = x;
      fLow = f;
      fHigh /= 2;
    } else {
      high = x;
      fHigh = f;
      fLow /= 2;
    }
  }
  return low + (high - low) / 2;
}

/** The x ≥ 0 at which an increasing probability equals p, with the same accuracy as `tailQuantile`. */
export function lowerQuantile(cdf: (x: number) => number, p: number): number {
  return 1 / tailQuantile((z) => cdf(1 / z), p);
}
