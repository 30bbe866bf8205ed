import type { Regression } from "../../estimate/index.js";
import { type Axis, axisFor } from "./axis.js";
import type { Interval } from "./interval.js";

/** The common axis on which the coefficients of a fit are drawn. */
export interface EffectAxis {
  readonly axis: Axis;
  /** What a unit on the axis is, for its heading. */
  readonly title: string;
  /** Factor by which coefficient j is drawn. */
  readonly factors: readonly number[];
}

/**
 * One axis for all coefficients of a regression. They are drawn as they are where all intervals can be told apart on one
 * axis. Where they cannot, because the terms are in unlike units, each is drawn per standard deviation of its term: then
 * all are in units of the outcome. The intercept and other constants have no such unit; they are drawn as they are,
 * and do not stretch the axis.
 */
export function effectAxis(
  intervals: readonly Interval[],
  regression: Pick<Regression, "X" | "interceptAt" | "T">,
): EffectAxis {
  const plain = intervals.map(() => 1);
  const free = intervals.filter((_, j) => j !== regression.interceptAt);
  const asIs = axisFor(free.length > 0 ? free : intervals);
  const narrowest = free.reduce(
    (least, { low, high }) => (high > low ? Math.min(least, high - low) : least),
    Number.POSITIVE_INFINITY,
  );
  const legible = !(narrowest < 0.02 * (asIs.to - asIs.from));
  if (legible) return { axis: asIs, title: "Per unit of the term", factors: plain };
  const factors = intervals.map((_, j) => spreadOf(regression, j) || 1);
  const scaled = intervals.map((interval, j) => scale(interval, factors[j]!));
  const moving = scaled.filter((_, j) => j !== regression.interceptAt && spreadOf(regression, j) > 0);
  return {
    axis: axisFor(moving.length > 0 ? moving : scaled),
    title: "Per standard deviation of the term",
    factors,
  };
}

/** An interval in other units. */
export function scale({ estimate, low, high }: Interval, factor: number): Interval {
  return { estimate: estimate * factor, low: low * factor, high: high * factor };
}

// Standard deviation of column j, two passes.
function spreadOf({ X, T }: Pick<Regression, "X" | "T">, j: number): number {
  const column = X.data.subarray(j * T, (j + 1) * T);
  let sum = 0;
  for (const x of column) sum += x;
  const mean = sum / T;
  let squares = 0;
  for (const x of column) squares += (x - mean) ** 2;
  return Math.sqrt(squares / (T - 1));
}
