import { brentRoot, logGamma } from "../../numeric/index.js";

/**
 * P(Dₙ > d) for the two-sided one-sample Kolmogorov–Smirnov distance of n independent uniforms.
 *
 * Far tail (n d² > 4): twice the exact one-sided tail (Smirnov 1944), the doubly counted part being below 1e-6 of
 * it. Otherwise for n ≤ 300 Durbin's matrix form as evaluated by Marsaglia, Tsang and Wang (2003); beyond, the
 * expansion of Pelz and Good (1976) to order n^(−3/2), as arranged by Simard and L'Ecuyer (2011).
 */
export function kolmogorovUpper(d: number, n: number): number {
  if (!(d > 0.5 / n)) return 1;
  if (d >= 1) return 0;
  if (n * d * d > 4) return Math.min(1, 2 * smirnovUpper(d, n));
  return Math.min(1, Math.max(0, 1 - (n <= 300 ? durbinMatrix(d, n) : pelzGood(d, n))));
}

/** The d with P(Dₙ > d) = `p`. */
export function kolmogorovUpperQuantile(p: number, n: number): number {
  return brentRoot((d) => kolmogorovUpper(d, n) - p, 0.5 / n, 1, 1e-13);
}

/** P(Dₙ⁺ > d), the one-sided distance, exact. */
function smirnovUpper(d: number, n: number): number {
  let sum = 0;
  const last = Math.floor(n * (1 - d));
  const logFactorial = logGamma(n + 1);
  for (let j = 0; j <= last; j++) {
    const rest = 1 - d - j / n;
    if (rest <= 0) continue;
    const choose = logFactorial - logGamma(j + 1) - logGamma(n - j + 1);
    sum += Math.exp(choose + (j - 1) * Math.log(d + j / n) + (n - j) * Math.log(rest));
  }
  return d * sum;
}

/** P(Dₙ < d) as an entry of the n-th power of a small matrix. */
function durbinMatrix(d: number, n: number): number {
  const k = Math.floor(n * d) + 1;
  const m = 2 * k - 1;
  const h = k - n * d;
  const H = Array.from({ length: m }, (_, i) =>
    Float64Array.from({ length: m }, (_, j) => +(i - j + 1 >= 0)),
  );
  for (let i = 0; i < m; i++) {
    H[i]![0]! -= h ** (i + 1);
    H[m - 1]![i]! -= h ** (m - i);
  }
  H[m - 1]![0]! += 2 * h - 1 > 0 ? (2 * h - 1) ** m : 0;
  for (let i = 0; i < m; i++) for (let j = 0; j < m; j++) for (let g = 2; g <= i - j + 1; g++) H[i]![j]! /= g;
  let power: Float64Array[] | undefined;
  let square: Float64Array[] = H;
  for (let rest = n; rest > 0; rest = Math.floor(rest / 2)) {
    if (rest % 2 === 1) power = power ? product(power, square) : square;
    if (rest > 1) square = product(square, square);
  }
  let logScale = 0;
  for (let i = 1; i <= n; i++) logScale += Math.log(i / n);
  return Math.exp(Math.log(power![k - 1]![k - 1]!) + logScale);
}

function product(a: readonly Float64Array[], b: readonly Float64Array[]): Float64Array[] {
  const m = a.length;
  return a.map((row) => {
    const result = new Float64Array(m);
    for (let k = 0; k < m; k++) for (let j = 0; j < m; j++) result[j]! += row[k]! * b[k]![j]!;
    return result;
  });
}

/** P(√n Dₙ < z) by the expansion of Pelz and Good. */
function pelzGood(d: number, n: number): number {
  const z = Math.sqrt(n) * d;
  const z2 = z * z;
  const z4 = z2 * z2;
  const z6 = z4 * z2;
  const pi2 = Math.PI ** 2;
  let k0 = 0;
  let k1 = 0;
  let k2 = 0;
  let k3 = 0;
  let k2rest = 0;
  let k3rest = 0;
  for (let k = 0; k < 30; k++) {
    const a = pi2 * (k + 0.5) ** 2;
    const weight = 2 * Math.exp(-a / (2 * z2)); // k and −k−1 together
    k0 += weight / 2;
    k1 += weight * (a - z2);
    k2 += weight * (6 * z6 + 2 * z4 + (2 * z4 - 5 * z2) * a + (1 - 2 * z2) * a * a);
    k3 +=
      weight *
      ((5 - 30 * z2) * a ** 3 +
        (-60 * z2 + 212 * z4) * a * a +
        (135 * z4 - 96 * z6) * a -
        30 * z6 -
        90 * z4 * z4);
    const b = pi2 * k * k;
    const whole = 2 * Math.exp(-b / (2 * z2));
    k2rest += whole * b;
    k3rest += whole * (-b * b + 3 * b * z2);
  }
  const c = Math.sqrt(Math.PI / 2);
  return (
    (2 * c * k0) / z +
    (c * k1) / (6 * z4 * Math.sqrt(n)) +
    (c * (k2 / (72 * z6 * z) - k2rest / (36 * z2 * z))) / n +
    (c * (k3 / (6480 * z4 * z6) + k3rest / (216 * z6))) / n ** 1.5
  );
}
