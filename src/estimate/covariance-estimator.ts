import type { Remark } from "../data/index.js";
import type { Matrix } from "../numeric/index.js";
import type { Regression } from "./regression.js";

/** The law that a t ratio c'β̂ / se is judged by. */
export interface ReferenceLaw {
  /** As a card writes it: `t(123)`, `normal`, `fixed-b, b = 0.09`. */
  readonly name: string;
  readonly df?: number;
  /** P(|t| > |observed|). */
  twoSided(t: number): number;
  /** The c with P(|t| > c) = 1 − level. */
  critical(level: number): number;
}

/** The law that a Wald statistic W of q restrictions is judged by. */
export interface JointLaw {
  readonly name: string;
  readonly df: readonly number[];
  /** P(W' > wald). */
  upper(wald: number): number;
  /** Standard error of `upper` where it is itself simulated. */
  readonly error?: number;
}

/** What an estimator makes of one regression. */
export interface Covariance {
  /** The estimator with its choices spelled out: `Newey–West, 18 lags (bandwidth 19)`. */
  readonly label: string;
  /** k×k covariance of the coefficients. */
  readonly matrix: Matrix;
  /** Every choice made or found: kernel, bandwidth, lags, rule, factor, degrees of freedom, ... */
  readonly details: Readonly<Record<string, number | string | boolean | null>>;
  readonly remarks: readonly Remark[];
  /** The law of c'β̂ / se for a contrast c of length k. */
  reference(contrast: Float64Array): ReferenceLaw;
  /** The law of the Wald statistic of R (q×k) restrictions. Throws when q exceeds what the estimator can bear. */
  joint(restrictions: Matrix): JointLaw;
}

/** A covariance estimator: put on a fit afterwards, it never re-estimates the coefficients. */
export interface CovarianceEstimator {
  /** `classical`, `white`, `hac`, `cosine`, `batches`, ... */
  readonly kind: string;
  /** Short name for tables: `Newey–West`, `White HC3`. */
  readonly label: string;
  /** What it was asked for, as JSON: enough to make it again. */
  readonly options: Readonly<Record<string, unknown>>;
  on(regression: Regression): Covariance;
}
