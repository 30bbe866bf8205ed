import { periodLabel } from "../data/index.js";
import type { Design } from "../design/index.js";
import {
  columnOf,
  InputError,
  type Matrix,
  orthonormalBasis,
  RankDeficient,
  solveLeastSquares,
} from "../numeric/index.js";
import type { Regression } from "./regression.js";

/** A regression by least squares, with what only the estimation itself knows. */
export interface LeastSquaresFit extends Regression {
  /** 2-norm condition number of X with its columns at unit length. */
  readonly condition: number;
}

/**
 * Least squares of a design (T rows, k columns). Throws InputError naming the terms that depend on one another, with
 * the combination that reproduces each.
 */
export function regress(design: Design): LeastSquaresFit {
  const { X, y, terms, interceptAt, periods, laggedOutcome, index } = design;
  const solved = solve(X, y, terms);
  let Q: Matrix | undefined;
  let leverage: Float64Array | undefined;
  return {
    X,
    y,
    coefficients: solved.coefficients,
    residuals: solved.residuals,
    gramInverse: solved.gramInverse,
    rss: solved.rss,
    condition: solved.condition,
    T: X.rows,
    k: X.columns,
    terms,
    interceptAt,
    periods,
    laggedOutcome,
    periodName: (row) => periodLabel(index, periods[row]!),
    get Q() {
      Q ??= orthonormalBasis(X);
      return Q;
    },
    get leverage() {
      leverage ??= rowLengths(this.Q);
      return leverage;
    },
  };
}

function solve(X: Matrix, y: Float64Array, terms: readonly string[]) {
  try {
    return solveLeastSquares(X, y);
  } catch (error) {
    if (error instanceof RankDeficient) throw new InputError(dependenceMessage(error, X, terms));
    throw error;
  }
}

function dependenceMessage(error: RankDeficient, X: Matrix, terms: readonly string[]): string {
  const target = error.dependent[0]!;
  const parts = error.combination[0]!;
  const name = JSON.stringify(terms[target]);
  const wayOut = `Drop one of them.`;
  const column = columnOf(X, target);
  if (parts.length === 0) return `fit: ${name} is zero in every period used. Drop it.`;
  if (column.every((value) => value === column[0])) {
    return `fit: ${name} is constant (${column[0]}) over the periods used and cannot be told from the intercept. Drop it, or say intercept: false.`;
  }
  if (parts.length === 1 && terms[parts[0]!.column] === "intercept") {
    return `fit: ${name} hardly varies against its size and cannot be told from the intercept. Measure it from another origin, or drop it.`;
  }
  const written = parts.map(({ column, weight }, i) => {
    const size = Math.abs(weight);
    const factor = Math.abs(size - 1) < 1e-9 ? "" : `${Number(size.toPrecision(6))} × `;
    const sign = weight < 0 ? "\u2212 " : i === 0 ? "" : "+ ";
    return `${sign}${factor}${JSON.stringify(terms[column])}`;
  });
  return `fit: the terms depend on one another: ${name} = ${written.join(" ")} in every period used. ${wayOut}`;
}

function rowLengths(Q: Matrix): Float64Array {
  const result = new Float64Array(Q.rows);
  for (let j = 0; j < Q.columns; j++) {
    const column = columnOf(Q, j);
    for (let t = 0; t < Q.rows; t++) result[t]! += column[t]! * column[t]!;
  }
  return result;
}
