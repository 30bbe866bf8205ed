import { periodLabel } from "../data/index.js";
import type { Design } from "../design/index.js";
import {
  columnOf,
  InputError,
  type LeastSquares,
  type Matrix,
  norm,
  orthonormalBasis,
  RankDeficient,
  solveLeastSquares,
} from "../numeric/index.js";
import { dependenceMessage } from "./dependence-message.js";
import type { Regression } from "./regression.js";

/** A regression by least squares, with what only the estimation itself knows. */
export interface LeastSquaresFit extends Regression {
  /** 2-norm condition number of X with its columns at unit length. */
  readonly condition: number;
}

/**
 * Least squares of a design (T rows, k columns). Throws InputError naming the terms that depend on one another, with
 * the combination that reproduces each, and the series whose size leaves no room for its squares.
 */
export function regress(design: Design): LeastSquaresFit {
  const { X, y, terms, interceptAt, periods, laggedOutcome, index } = design;
  const solved = solve(design);
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

function solve({ X, y, terms, outcome }: Design): LeastSquares {
  try {
    const solved = solveLeastSquares(X, y);
    requireSquares(solved, X, y, terms, outcome);
    return solved;
  } catch (error) {
    if (error instanceof RankDeficient) throw new InputError(dependenceMessage(error, X, terms));
    throw error;
  }
}

// Sums of squares beyond 1e±290 overflow, or lose digits to underflow, without a word.
function requireSquares(
  { rss, gramInverse }: LeastSquares,
  X: Matrix,
  y: Float64Array,
  terms: readonly string[],
  outcome: string,
): void {
  const tiny = rss < 1e-290 && norm(y) > 0 && norm(y) < 1e-130;
  if (tiny || !(rss < 1e290)) throw new InputError(sizeMessage(outcome, y));
  for (let j = 0; j < terms.length; j++) {
    const square = gramInverse.data[j * terms.length + j]!;
    if (!(square > 1e-290 && square < 1e290)) throw new InputError(sizeMessage(terms[j]!, columnOf(X, j)));
  }
}

function sizeMessage(label: string, values: Float64Array): string {
  let size = 0;
  for (const value of values) size = Math.max(size, Math.abs(value));
  const factor = `1e${-Math.floor(Math.log10(size))}`;
  return `fit: "${label}" has values of a size (up to ${size.toPrecision(3)}) whose squares cannot be held. Measure it in another unit: times(${JSON.stringify(label)}, ${factor}).`;
}

function rowLengths(Q: Matrix): Float64Array {
  const result = new Float64Array(Q.rows);
  for (let j = 0; j < Q.columns; j++) {
    const column = columnOf(Q, j);
    for (let t = 0; t < Q.rows; t++) result[t]! += column[t]! * column[t]!;
  }
  return result;
}
