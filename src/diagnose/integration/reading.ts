import type { Test } from "../test.js";

/** What a unit-root and a stationarity test say together. */
export type Reading =
  | "stationary"
  | "stationary around a trend"
  | "integrated of order one"
  | "integrated of order two or more"
  | "undecided"
  | "contradictory";

/** The tests of one series that the reading weighs. */
export interface ReadingTests {
  /** ADF and KPSS about a constant, and about a trend. */
  readonly level: { readonly adf: Test; readonly kpss: Test };
  readonly trend: { readonly adf: Test; readonly kpss: Test };
  /** ADF about a constant on the first differences. */
  readonly differences: Test;
}

/**
 * Stationary where the unit root is rejected and stationarity is not, about a level or failing that about a trend; integrated where it
 * is the other way round in both, of order one if the differences reject; undecided where neither rejects, contradictory
 * where both do (long memory, a break, or a bandwidth that is too small).
 */
export function jointReading(tests: ReadingTests, alpha: number): Reading {
  const says = ({ adf, kpss }: { adf: Test; kpss: Test }) => ({
    unitRootRejected: adf.p < alpha,
    stationarityRejected: kpss.p < alpha,
  });
  const level = says(tests.level);
  const trend = says(tests.trend);
  if (level.unitRootRejected && !level.stationarityRejected) return "stationary";
  if (trend.unitRootRejected && !trend.stationarityRejected) return "stationary around a trend";
  if (!level.unitRootRejected && !trend.unitRootRejected) {
    if (!level.stationarityRejected && !trend.stationarityRejected) return "undecided";
    return tests.differences.p < alpha ? "integrated of order one" : "integrated of order two or more";
  }
  return "contradictory";
}
