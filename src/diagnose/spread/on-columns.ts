import { chiSquaredTest, fisherTest, notComputed } from "../parts/laws.js";
import { addColumns } from "../parts/projection.js";
import type { Test } from "../test.js";

/** The forms of a test of squared residuals against columns. */
export interface SquareTests {
  readonly LM: Test;
  readonly F: Test;
  /** Explained sum of squares of e²/mean(e²): half of it is Breusch and Pagan's statistic. */
  readonly explained: number;
  readonly df: number;
}

/**
 * Squares of `residuals` on a constant and `columns` (linearly dependent ones counted once): T·R² against χ²(df), and
 * the F form against F(df, T − df − 1).
 */
export function squaresOn(
  residuals: Float64Array,
  columns: readonly Float64Array[],
  names: { LM: string; F: string },
): SquareTests {
  const T = residuals.length;
  const square = residuals.reduce((sum, e) => sum + e * e, 0) / T;
  const target = residuals.map((e) => (e * e) / square);
  const constant = new Float64Array(T).fill(1 / Math.sqrt(T));
  const { rss, rank } = addColumns(target, [constant], columns);
  const n = columns.length;
  const df = rank[n]!;
  const rest = T - df - 1;
  const explained = rss[0]! - rss[n]!;
  const why =
    df === 0
      ? "the terms do not vary"
      : rest < 1
        ? `${df} columns leave no degrees of freedom in ${T} periods`
        : rss[0]! <= 1e-24 * T
          ? "the squared residuals do not vary"
          : undefined;
  if (why !== undefined)
    return { LM: notComputed(names.LM, why), F: notComputed(names.F, why), explained: Number.NaN, df };
  return {
    LM: chiSquaredTest(names.LM, (T * explained) / rss[0]!, df),
    F: fisherTest(names.F, explained / df / (rss[n]! / rest), df, rest),
    explained,
    df,
  };
}
