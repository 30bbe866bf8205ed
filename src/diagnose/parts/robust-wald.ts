import { cosine } from "../../covariance/index.js";
import type { CovarianceEstimator, Regression } from "../../estimate/index.js";
import {
  cholesky,
  columnOf,
  fromColumns,
  InputError,
  matrix,
  NotPositiveDefinite,
  solveCholesky,
} from "../../numeric/index.js";
import type { Test, TestDetails } from "../test.js";
import { notComputed } from "./laws.js";

/**
 * Wald test that the coefficients at `tested` are all zero, under a covariance that allows for dependent and uneven errors
 * (equal-weighted cosines unless another estimator is given), judged by that estimator's own law. `statistic` is W.
 */
export function robustWald(
  name: string,
  m: Regression,
  tested: readonly number[],
  details: TestDetails = {},
  estimator: CovarianceEstimator = cosine(),
): Test {
  const q = tested.length;
  if (q === 0) return notComputed(name, "nothing to test");
  const R = matrix(q, m.k);
  tested.forEach((at, i) => {
    R.data[at * q + i] = 1;
  });
  try {
    const covariance = estimator.on(m);
    const law = covariance.joint(R); // refuses more restrictions than the estimator can bear
    const V = covariance.matrix;
    const size = tested.map((at) => Math.sqrt(V.data[at * m.k + at]!));
    if (size.some((s) => !(s > 0))) return notComputed(name, "a variance is zero or negative");
    const unit = matrix(q, q);
    for (let j = 0; j < q; j++)
      for (let i = 0; i < q; i++)
        unit.data[j * q + i] = V.data[tested[j]! * m.k + tested[i]!]! / (size[i]! * size[j]!);
    const b = fromColumns([tested.map((at, i) => m.coefficients[at]! / size[i]!)]);
    const solved = columnOf(solveCholesky(cholesky(unit), b), 0);
    const wald = solved.reduce((sum, x, i) => sum + x * b.data[i]!, 0);
    return {
      name,
      statistic: wald,
      df: law.df,
      distribution: `Wald, ${law.name}`,
      p: law.upper(wald),
      valid: true,
      note: covariance.label,
      ...details,
    };
  } catch (problem) {
    if (problem instanceof InputError) return notComputed(name, problem.message);
    if (problem instanceof NotPositiveDefinite)
      return notComputed(name, "the covariance of what is tested is singular");
    throw problem;
  }
}
