import type { TimeIndex } from "../data/index.js";
import type { Regression } from "../estimate/index.js";

/** What a diagnostic needs of a fit; every `Fit` has it. */
export interface Fitted {
  /** What was regressed in the end: whitened rows where the errors are modelled. */
  readonly regression: Regression;
  readonly outcome: string;
  /** Confidence level of intervals and bands. */
  readonly level: number;
  readonly design: { readonly index: TimeIndex };
  /** The table that was fitted: tells which labels are names of columns. */
  readonly table?: { has(name: string): boolean };
  /** Under the covariance estimator that is on; classical standard errors stand in where there is none. */
  readonly coefficients?: readonly { readonly term: string; readonly se: number }[];
  /** The periods used, as cards write them: `2019-W01 to 2022-W52`. */
  readonly span?: string;
  readonly specification?: unknown;
  readonly fingerprint?: string;
}
