export { autocovariances } from "./autocovariances.js";
export { cholesky, NotPositiveDefinite, solveCholesky } from "./cholesky.js";
export { chiSquared } from "./distributions/chi-squared.js";
export { fisher } from "./distributions/fisher.js";
export { normal } from "./distributions/normal.js";
export { logGamma } from "./distributions/stirling.js";
export { studentT } from "./distributions/student-t.js";
export { durbinWatsonLower, durbinWatsonTails, type RatioTails } from "./durbin-watson.js";
export { singularValues, symmetricEigen } from "./eigen.js";
export { symmetricEigenvalues } from "./eigenvalues.js";
export { InputError } from "./failure.js";
export { fft } from "./fft.js";
export { laggedProducts } from "./lagged-products.js";
export { leadingEigenvalues } from "./leading-eigenvalues.js";
export { type LeastSquares, solveLeastSquares } from "./least-squares.js";
export { columnOf, entry, fromColumns, type Matrix, matrix } from "./matrix.js";
export { hessian, type MinimiseOptions, type Minimum, minimise } from "./minimise.js";
export { brentMinimum } from "./minimum.js";
export { movingSumProducts } from "./moving-sums.js";
export { orthonormalBasis, projectOut } from "./orthonormal.js";
export {
  crossproduct,
  dot,
  identity,
  multiply,
  symmetricProduct,
  timesVector,
  transpose,
  transposeTimesVector,
} from "./products.js";
export { craigTail, imhofUpper } from "./quadratic-forms.js";
export { gaussLegendre } from "./quadrature.js";
export { type CounterRandom, counterRandom } from "./random.js";
export { RankDeficient } from "./rank.js";
export { brentRoot } from "./roots.js";
export { norm, powerOfTwo, solveUpper, solveUpperTransposed } from "./scaling.js";
export { scoreGram, scoreLaggedProducts, scoreMovingSums } from "./score-sums.js";
export type { RowSeries } from "./series-block.js";
