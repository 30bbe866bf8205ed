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
  readonly specification?: unknown;
  readonly fingerprint?: string;
}
