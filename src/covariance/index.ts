/*
 * Covariance estimators, and what they do to conclusions. The bootstrapped estimator needs the resampling room, which
 * stands above this one: it is made there (src/resample) to the same contract, `CovarianceEstimator` of the estimate room,
 * and joins the others in src/index.ts.
 */
export { type BandwidthPathOptions, bandwidthPath } from "./compare/bandwidth-path.js";
export type { ComparedCoefficient, ComparedEstimator, ComparedInterval } from "./compare/comparison.js";
export { type CovariancesOptions, covariances } from "./compare/covariances.js";
export type { Covariances } from "./compare/covariances-result.js";
export type { BandwidthPath, RuleMark } from "./compare/path-result.js";
export { type BatchOptions, batches } from "./estimators/batches.js";
export { type CalibratedOptions, calibrated, type KnownErrors } from "./estimators/calibrated.js";
export { classical } from "./estimators/classical.js";
export { type CosineOptions, cosine } from "./estimators/cosine.js";
export { defaultComparison, defaultEstimator } from "./estimators/default.js";
export { type HacOptions, hac, type NeweyWestOptions, neweyWest } from "./estimators/hac.js";
export { type WhiteType, white } from "./estimators/white.js";
export type { Combination } from "./hypotheses/combination.js";
export { combine } from "./hypotheses/combine.js";
export type { JointTest } from "./hypotheses/joint-test.js";
export { jointly } from "./hypotheses/jointly.js";
export type { Restriction, Weights } from "./hypotheses/restrictions.js";
export type { KernelName } from "./kernels.js";
export type { Law } from "./laws/choice.js";
export type { BandwidthRule } from "./rules/bandwidth.js";
export type { Fitted } from "./subject.js";
