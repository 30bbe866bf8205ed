export { type Coefficient, requireLevel } from "./coefficients.js";
export type { Covariance, CovarianceEstimator, JointLaw, ReferenceLaw } from "./covariance-estimator.js";
export { type ErrorModel, iid } from "./errors.js";
export { estimate, type FitOptions } from "./estimate.js";
export { Fit } from "./fit.js";
export type { FitParts, Specification } from "./fit-parts.js";
export { type LeastSquaresFit, regress } from "./regress.js";
export type { Regression } from "./regression.js";
