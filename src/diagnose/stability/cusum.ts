import { brentRoot, normal } from "../../numeric/index.js";
import { notComputed } from "../parts/laws.js";
import type { Test } from "../test.js";
import type { Recursion } from "./recursion.js";

/** A path of cumulated residuals with the band it has to stay in. */
export interface CusumPath {
  readonly test: Test;
  /** At most `points` of them, the one furthest out kept; `row` is a row of the regression. */
  readonly path: readonly {
    readonly row: number;
    readonly value: number;
    readonly low: number;
    readonly high: number;
  }[];
}

/**
 * P(a path leaves ±a[√n + 2(r − k)/√n]) = 2[Q(3a) + e^{−4a²}Φ(a)], Q the upper normal tail: the limit law of
 * Brown, Durbin and Evans (1975). Capped at one.
 */
export function cusumUpper(a: number): number {
  return Math.min(1, 2 * (normal.upper(3 * a) + Math.exp(-4 * a * a) * normal.cdf(a)));
}

/** The a with that probability `alpha`. */
export function cusumUpperQuantile(alpha: number): number {
  return brentRoot((a) => cusumUpper(a) - alpha, 0.3, 10, 1e-12);
}

/** Cumulated recursive residuals over their standard deviation (Brown, Durbin and Evans 1975). */
export function cusum({ residuals, rows }: Recursion, level: number, points = 300): CusumPath {
  const name = "CUSUM";
  const n = residuals.length;
  const square = residuals.reduce((sum, w) => sum + w * w, 0);
  if (n < 3 || !(square > 0))
    return { test: notComputed(name, `${n} recursive residuals are too few`), path: [] };
  const s = Math.sqrt(square / n);
  const a = cusumUpperQuantile(1 - level);
  const half = (i: number) => Math.sqrt(n) + (2 * (i + 1)) / Math.sqrt(n);
  const values = new Float64Array(n);
  let sum = 0;
  let furthest = 0;
  for (let i = 0; i < n; i++) {
    sum += residuals[i]! / s;
    values[i] = sum;
    if (Math.abs(sum) / half(i) > Math.abs(values[furthest]!) / half(furthest)) furthest = i;
  }
  const statistic = Math.abs(values[furthest]!) / half(furthest);
  const every = Math.max(1, Math.ceil(n / points));
  return {
    test: {
      name,
      statistic,
      df: [],
      distribution: "Brownian motion against two lines",
      p: cusumUpper(statistic),
      valid: true,
    },
    path: [...values.keys()]
      .filter((i) => i % every === 0 || i === furthest || i === n - 1)
      .map((i) => ({ row: rows[i]!, value: values[i]!, low: -a * half(i), high: a * half(i) })),
  };
}
