import type { Remark, TimeTable } from "../data/index.js";
import type { Design } from "../design/index.js";
import type { CovarianceEstimator } from "./covariance-estimator.js";
import type { Goodness } from "./goodness.js";
import type { LeastSquaresFit } from "./regress.js";

/** What a fit was asked to be, as JSON. */
export interface Specification {
  readonly outcome: string;
  readonly terms: readonly string[];
  readonly intercept: boolean;
  /** First and last period used. */
  readonly sample: readonly [string, string];
  readonly errors: string;
}

/** Looks at a regression and may have something to remark on it. */
export type Watcher = (regression: LeastSquaresFit) => Remark | undefined;

/** Everything a fit is made of. */
export interface FitParts {
  readonly table: TimeTable;
  readonly design: Design;
  readonly regression: LeastSquaresFit;
  readonly estimator: CovarianceEstimator;
  readonly level: number;
  /** Rooms above this one may have something to remark on a regression; asked when the remarks are first read. */
  readonly watch?: readonly Watcher[];
}

/** What fits that differ in estimator or level alone have in common, each formed at first use. */
export interface Shared {
  readonly goodness: Goodness;
  periods?: readonly string[];
  residuals?: Float64Array;
  fitted?: Float64Array;
  watched?: readonly Remark[];
}
