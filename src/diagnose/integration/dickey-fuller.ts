import { fromColumns, InputError, RankDeficient, solveLeastSquares } from "../../numeric/index.js";
import { addColumns } from "../parts/projection.js";
import type { Test } from "../test.js";
import { type Deterministic, deterministicColumns } from "./deterministic.js";
import { unitRootLower } from "./unit-root-law.js";

/** How the number of lagged differences is found. */
export type LagRule = "aic" | "bic" | "t" | number;

/** An augmented Dickey–Fuller regression. */
export interface DickeyFuller {
  /** The t ratio of the lagged level. */
  readonly tau: number;
  /** Lagged differences in the regression. */
  readonly lags: number;
  /** Periods used. */
  readonly n: number;
  readonly test: Test;
}

/** Schwert's (1989) highest number of lags, ⌊12(T/100)^¼⌋, kept low enough to leave as many periods as terms. */
export function highestLag(T: number, deterministic: Deterministic): number {
  const fixed = deterministic === "none" ? 1 : deterministic === "constant" ? 2 : 3;
  return Math.max(0, Math.min(Math.floor(12 * (T / 100) ** 0.25), Math.floor((T - 2 - 2 * fixed) / 3)));
}

/**
 * Dickey and Fuller (1979), Said and Dickey (1984): Δy(t) on deterministic terms, y(t−1) and lagged differences; left tail. Lags
 * by AIC, BIC or from the top by |t| > 1.645, all on the sample that the highest lag leaves; the test itself uses every period
 * it can.
 * Throws an InputError when `y` is constant or too short.
 */
export function dickeyFuller(
  y: Float64Array,
  deterministic: Deterministic,
  rule: LagRule,
  what: string,
): DickeyFuller {
  const T = y.length;
  const scaled = unit(y, deterministic === "none", what);
  const difference = Float64Array.from({ length: T - 1 }, (_, t) => scaled[t + 1]! - scaled[t]!);
  const highest = typeof rule === "number" ? rule : highestLag(T, deterministic);
  const fixed = deterministicColumns(deterministic, 1).length + 1;
  if (T - 1 - highest <= fixed + highest)
    throw new InputError(
      `${what}: ${T} periods are too few for a unit-root regression with ${highest} lagged differences.`,
    );
  const lags = typeof rule === "number" ? rule : chosenLag(scaled, difference, deterministic, highest, rule);
  const { columns, target } = design(scaled, difference, deterministic, lags, lags);
  const n = target.length;
  const at = deterministicColumns(deterministic, 1).length;
  try {
    const { coefficients, gramInverse, rss } = solveLeastSquares(fromColumns(columns), target);
    const k = columns.length;
    const total = target.reduce((sum, x) => sum + x * x, 0);
    if (rss <= (n * 2 ** -52) ** 2 * total)
      throw new InputError(`${what}: the unit-root regression fits exactly, so it has no t ratio.`);
    const s2 = rss / (n - k);
    const tau = coefficients[at]! / Math.sqrt(s2 * gramInverse.data[at * k + at]!);
    return { tau, lags, n, test: asTest(tau, n, deterministic, lags) };
  } catch (problem) {
    if (problem instanceof RankDeficient)
      throw new InputError(
        `${what}: the series follows its own past exactly (the terms of the unit-root regression depend on one another).`,
      );
    throw problem;
  }
}

function asTest(tau: number, n: number, deterministic: Deterministic, lags: number): Test {
  return {
    name: "ADF",
    lags,
    statistic: tau,
    df: [],
    distribution: `Dickey–Fuller, ${deterministic}`,
    p: unitRootLower(tau, n, deterministic),
    valid: true,
    note: `${lags} lagged differences, ${n} periods`,
  };
}

/** Columns det, y(t−1), Δy(t−1) .. Δy(t−lags) and Δy(t), over the periods that have `skip` differences before them. */
function design(
  y: Float64Array,
  difference: Float64Array,
  deterministic: Deterministic,
  lags: number,
  skip: number,
) {
  const n = difference.length - skip;
  const columns = [...deterministicColumns(deterministic, n), y.slice(skip, skip + n)];
  for (let i = 1; i <= lags; i++) columns.push(difference.slice(skip - i, skip - i + n));
  return { columns, target: difference.slice(skip) };
}

function chosenLag(
  y: Float64Array,
  difference: Float64Array,
  deterministic: Deterministic,
  highest: number,
  rule: "aic" | "bic" | "t",
): number {
  const { columns, target } = design(y, difference, deterministic, highest, highest);
  const n = target.length;
  const fixed = columns.length - highest;
  const { rss } = addColumns(target, [], columns);
  const after = (p: number) => rss[fixed + p]!;
  if (rule === "t") {
    for (let p = highest; p > 0; p--) {
      const t2 = (after(p - 1) - after(p)) / (after(p) / (n - fixed - p));
      if (t2 > 1.645 ** 2) return p;
    }
    return 0;
  }
  const price = rule === "aic" ? 2 : Math.log(n);
  let best = 0;
  let least = Number.POSITIVE_INFINITY;
  for (let p = 0; p <= highest; p++) {
    const criterion = n * Math.log(after(p) / n) + price * (fixed + p);
    if (criterion < least) {
      least = criterion;
      best = p;
    }
  }
  return best;
}

/** `y` in units of its spread, about its mean unless that would add a constant. */
function unit(y: Float64Array, aboutZero: boolean, what: string): Float64Array {
  let largest = 0;
  for (const v of y) largest = Math.max(largest, Math.abs(v));
  const mean = y.reduce((sum, v) => sum + v / y.length, 0);
  const centred = y.map((v) => v - mean);
  const size = Math.sqrt(centred.reduce((sum, v) => sum + (v / (largest || 1)) ** 2, 0)) * largest;
  if (!(size > y.length * 2 ** -52 * largest))
    throw new InputError(`${what}: the series is constant, so it has no unit root to test for.`);
  return (aboutZero ? y : centred).map((v) => (v / size) * Math.sqrt(y.length));
}
