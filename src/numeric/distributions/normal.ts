import { normalUpper } from "./normal-tail.js";

/** Numerators and denominators of Wichura's (1988) algorithm AS 241, highest power last. */
const central = [
  [
    3.387132872796366608, 133.14166789178437745, 1971.5909503065514427, 13731.693765509461125,
    45921.953931549871457, 67265.770927008700853, 33430.575583588128105, 2509.0809287301226727,
  ],
  [
    1, 42.313330701600911252, 687.1870074920579083, 5394.1960214247511077, 21213.794301586595867,
    39307.89580009271061, 28729.085735721942674, 5226.495278852854561,
  ],
] as const;
const outer = [
  [
    1.42343711074968357734, 4.6303378461565452959, 5.7694972214606914055, 3.64784832476320460504,
    1.27045825245236838258, 0.24178072517745061177, 0.0227238449892691845833, 7.7454501427834140764e-4,
  ],
  [
    1, 2.05319162663775882187, 1.6763848301838038494, 0.68976733498510000455, 0.14810397642748007459,
    0.0151986665636164571966, 5.475938084995344946e-4, 1.05075007164441684324e-9,
  ],
] as const;
const far = [
  [
    6.6579046435011037772, 5.4637849111641143699, 1.7848265399172913358, 0.29656057182850489123,
    0.026532189526576123093, 0.0012426609473880784386, 2.71155556874348757815e-5, 2.01033439929228813265e-7,
  ],
  [
    1, 0.59983220655588793769, 0.13692988092273580531, 0.0148753612908506148525, 7.868691311456132591e-4,
    1.8463183175100546818e-5, 1.4215117583164458887e-7, 2.04426310338993978564e-15,
  ],
] as const;

function ratio([above, below]: readonly [readonly number[], readonly number[]], r: number): number {
  let a = 0;
  let b = 0;
  for (let i = 7; i >= 0; i--) {
    a = a * r + above[i]!;
    b = b * r + below[i]!;
  }
  return a / b;
}

/** The x with P(Z ≤ x) = p; Wichura (1988), algorithm AS 241, relative error about 1e-16. */
function quantile(p: number): number {
  if (!(p >= 0 && p <= 1)) return Number.NaN;
  const q = p - 0.5;
  if (Math.abs(q) <= 0.425) return q * ratio(central, 0.180625 - q * q);
  const tail = q < 0 ? p : 1 - p;
  if (tail === 0) return q < 0 ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY;
  const r = Math.sqrt(-Math.log(tail));
  const x = r <= 5 ? ratio(outer, r - 1.6) : ratio(far, r - 5);
  return q < 0 ? -x : x;
}

/** The standard normal distribution. Tails keep their relative accuracy as far as doubles reach. */
export const normal = {
  /** P(Z ≤ x). */
  cdf: (x: number) => normalUpper(-x),
  /** P(Z > x). */
  upper: normalUpper,
  /** The x with P(Z ≤ x) = p. */
  quantile,
  /** The x with P(Z > x) = p. */
  upperQuantile: (p: number) => -quantile(p),
};
