import { InputError, imhofUpper } from "../../numeric/index.js";
import { residualised } from "../parts/projection.js";
import type { Test } from "../test.js";
import { deterministicColumns } from "./deterministic.js";
import { longRunVariance, shortLags } from "./phillips-perron.js";

/** What the series is supposed to be stationary around. */
export type Around = "constant" | "trend";

/**
 * Kwiatkowski, Phillips, Schmidt and Shin (1992): n⁻²ΣS_t²/λ² with S_t the cumulated deviations from a mean or a trend and λ²
 * by Bartlett weights over `lags`, default ⌊4(n/100)^¼⌋; upper tail, exact limit law. Leans strongly on `lags`: always shown.
 */
export function kpss(y: Float64Array, around: Around, lags: number | undefined, what: string): Test {
  const n = y.length;
  const basis: Float64Array[] = [];
  for (const column of deterministicColumns(around, n)) {
    const rest = residualised(column, basis);
    const length = Math.sqrt(rest.reduce((sum, v) => sum + v * v, 0));
    basis.push(rest.map((v) => v / length));
  }
  const e = residualised(y, basis);
  const largest = y.reduce((most, v) => Math.max(most, Math.abs(v)), 0);
  if (n < 4 || !(Math.sqrt(e.reduce((sum, v) => sum + v * v, 0)) > n * 2 ** -52 * largest * Math.sqrt(n)))
    throw new InputError(
      `${what}: the series is ${around === "trend" ? "an exact trend" : "constant"}, so it has no stationarity to test.`,
    );
  const l = lags ?? shortLags(n);
  const { longRun } = longRunVariance(e, l);
  let sum = 0;
  let squares = 0;
  for (const v of e) {
    sum += v;
    squares += sum * sum;
  }
  const statistic = squares / (n * n) / longRun;
  return {
    name: "KPSS",
    lags: l,
    statistic,
    df: [],
    distribution: around === "trend" ? "KPSS, trend" : "KPSS, level",
    p: kpssUpper(statistic, around),
    valid: true,
    note: `Bartlett weights over ${l} lags`,
  };
}

const terms = 60;
const eigenvalues = new Map<Around, Float64Array>();

/**
 * Upper tail of the limit law: Σ λⱼχ²₁ with λⱼ = 1/(πj)² about a mean; about a trend 1/x² over the roots of
 * 2 − 2cos x = x sin x, that is x = 2πj and tan(x/2) = x/2. The terms left out enter with their mean.
 */
export function kpssUpper(x: number, around: Around): number {
  if (!(x > 0)) return 1;
  let lambda = eigenvalues.get(around);
  if (!lambda) {
    lambda = around === "trend" ? trendEigenvalues() : levelEigenvalues();
    eigenvalues.set(around, lambda);
  }
  // the mean of the law is 1/6 about a mean, 1/15 about a trend
  const rest = (around === "trend" ? 1 / 15 : 1 / 6) - lambda.reduce((sum, v) => sum + v, 0);
  if (x <= rest) return 1;
  return Math.min(1, Math.max(0, imhofUpper(lambda, x - rest)));
}

function levelEigenvalues(): Float64Array {
  return Float64Array.from({ length: terms }, (_, j) => 1 / (Math.PI * (j + 1)) ** 2);
}

function trendEigenvalues(): Float64Array {
  const roots: number[] = [];
  for (let j = 1; j <= terms / 2; j++) {
    roots.push(2 * Math.PI * j);
    // tan v = v has its j-th positive root just below (j + ½)π
    let v = (j + 0.5) * Math.PI - 1 / ((j + 0.5) * Math.PI);
    for (let i = 0; i < 50; i++) v -= (Math.tan(v) - v) / Math.tan(v) ** 2;
    roots.push(2 * v);
  }
  return Float64Array.from(
    roots.sort((a, b) => a - b),
    (x) => 1 / (x * x),
  );
}
