import type { Covariance, CovarianceEstimator, Regression } from "../estimate/index.js";
import { InputError } from "../numeric/index.js";

/** What a comparison or a test of coefficients needs of a fit; every `Fit` has it. */
export interface Fitted {
  /** What was regressed in the end: whitened rows where the errors are modelled. */
  readonly regression: Regression;
  readonly outcome: string;
  /** Level of the intervals. */
  readonly level: number;
  readonly estimator: CovarianceEstimator;
  readonly covariance: Covariance;
  /** The periods used, as cards write them. */
  readonly span?: string;
  readonly specification?: unknown;
  readonly fingerprint?: string;
  /** Whether the residuals are zero to rounding. */
  readonly perfect?: boolean;
}

/** Refuses what is no fit, and a fit without errors. */
export function requireFit(m: Fitted, asked: string): void {
  if (typeof m !== "object" || m === null || !("regression" in m)) {
    throw new InputError(`${asked}: the first argument must be a fit, as fit(...) returns.`);
  }
  if (m.perfect) {
    throw new InputError(
      `${asked}: the fit is exact, so there are no errors to judge it by. Is the outcome among the terms?`,
    );
  }
}

/** What every record of this room carries of the fit it is about. */
export function aboutFit(m: Fitted): Record<string, unknown> {
  return {
    outcome: m.outcome,
    T: m.regression.T,
    k: m.regression.k,
    level: m.level,
    ...(m.span === undefined ? {} : { span: m.span }),
    ...(m.specification === undefined ? {} : { specification: m.specification }),
    ...(m.fingerprint === undefined ? {} : { fingerprint: m.fingerprint }),
  };
}

/** Numbers for a record: what is not finite becomes null. */
export const recordable = (x: number): number | null => (Number.isFinite(x) ? x : null);
