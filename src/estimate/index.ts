export type { Covariance, CovarianceEstimator, JointLaw, ReferenceLaw } from "./covariance-estimator.js";
export { type ErrorModel, iid } from "./errors.js";
export { estimate, type FitOptions } from "./estimate.js";
export { type Coefficient, Fit, type FitParts, requireLevel, type Specification } from "./fit.js";
export { type LeastSquaresFit, regress } from "./regress.js";
export type { Regression } from "./regression.js";
