import type { Regression } from "../../estimate/index.js";
import {
  cholesky,
  columnOf,
  crossproduct,
  fromColumns,
  type Matrix,
  matrix,
  NotPositiveDefinite,
  solveCholesky,
} from "../../numeric/index.js";
import { chiSquaredTest, notComputed } from "../parts/laws.js";
import { basisColumns, residualised } from "../parts/projection.js";
import { unitResiduals } from "../parts/residuals.js";
import { lagged, laggedProducts } from "../parts/time.js";
import type { Test } from "../test.js";

const name = "Cumby–Huizinga";

/**
 * Cumby and Huizinga (1992): no autocorrelation at lags `beyond`+1 .. `beyond`+`count`, where the errors may be a
 * moving average of order `beyond` and of uneven variance. Terms must be predetermined.
 *
 * Moments cⱼ = Σ ê(t) ê(t−j) with influence ê(t)·(ê(t−j) less its projection on x(t)), whose covariance sums lagged
 * products up to `beyond`, equally weighted; where that fails to be positive definite, Bartlett weights over twice
 * as many lags, and the note says so. With `beyond` = 0 it is the robust LM statistic.
 */
export function cumbyHuizinga(m: Regression, beyond: number, count: number): Test {
  const e = unitResiduals(m, "dependence");
  const basis = basisColumns(m.Q);
  const lags = Array.from({ length: count }, (_, i) => beyond + 1 + i);
  const highest = beyond + count;
  const influence = lags.map((lag) =>
    residualised(lagged(e, m.periods, lag), basis).map((r, t) => r * e[t]!),
  );
  const sums = influence.map((xi) => xi.reduce((sum, x) => sum + x, 0));
  const question =
    beyond === 0 ? "" : `lags ${beyond + 1} to ${highest}, whatever happens up to lag ${beyond}`;
  const equal = wald(sums, longRun(influence, m.periods, beyond, false));
  if (equal !== undefined)
    return chiSquaredTest(name, equal, count, { lags: highest, ...(question && { note: question }) });
  const tapered = wald(sums, longRun(influence, m.periods, 2 * beyond, true));
  if (tapered === undefined)
    return notComputed(name, "the covariance of the lagged products is singular", highest);
  return chiSquaredTest(name, tapered, count, {
    lags: highest,
    note: `${question}; Bartlett weights over ${2 * beyond} lags, since equal weights gave no positive definite covariance`,
  });
}

function longRun(
  columns: readonly Float64Array[],
  periods: Float64Array,
  lags: number,
  tapered: boolean,
): Matrix {
  const S = crossproduct(fromColumns(columns));
  for (let lag = 1; lag <= lags; lag++) {
    const weight = tapered ? 1 - lag / (lags + 1) : 1;
    columns.forEach((a, i) => {
      columns.forEach((b, j) => {
        const { sum } = laggedProducts(a, b, periods, lag);
        S.data[j * S.rows + i]! += weight * sum;
        S.data[i * S.rows + j]! += weight * sum;
      });
    });
  }
  return S;
}

function wald(sums: readonly number[], S: Matrix): number | undefined {
  const s = sums.length;
  const scale = sums.map((_, i) => Math.sqrt(S.data[i * s + i]!));
  if (scale.some((d) => !(d > 0))) return undefined;
  const unit = matrix(s, s);
  for (let j = 0; j < s; j++)
    for (let i = 0; i < s; i++) unit.data[j * s + i] = S.data[j * s + i]! / (scale[i]! * scale[j]!);
  const c = fromColumns([sums.map((sum, i) => sum / scale[i]!)]);
  try {
    const solution = columnOf(solveCholesky(cholesky(unit), c), 0);
    return solution.reduce((sum, x, i) => sum + x * c.data[i]!, 0);
  } catch (problem) {
    if (problem instanceof NotPositiveDefinite) return undefined;
    throw problem;
  }
}
