import type { Regression } from "../../estimate/index.js";
import { columnOf, type Matrix, multiply, transpose } from "../../numeric/index.js";
import type { Scores } from "../scores.js";
import { inverse } from "../shape/inverse.js";
import { addTimes } from "../shape/vectors.js";
import type { Series } from "../sums/series.js";

/**
 * The scores in the units of X, as the published bandwidth rules weigh them: 0 for the intercept's score and 1 for
 * the others, or 1 for the intercept's where it is the only one.
 */
export interface RawScores {
  /** T of the rule. */
  readonly T: number;
  readonly terms: readonly string[];
  readonly weighted: readonly boolean[];
  /** Score a over the calendar, zero where the period is missing. */
  column(a: number): Float64Array;
  /** 1 where a period is observed; absent when all are. */
  readonly observed?: Uint8Array;
}

function weighted({ k, interceptAt }: Regression): boolean[] {
  return Array.from({ length: k }, (_, a) => k === 1 || a !== interceptAt);
}

/** x_t û_t, formed column by column. */
export function rawScores(regression: Regression, scores: Scores): RawScores {
  const { X, residuals, terms, T } = regression;
  const { places, span } = scores;
  const column = (a: number): Float64Array => {
    const x = columnOf(X, a);
    const out = new Float64Array(span);
    for (let t = 0; t < T; t++) out[places ? places[t]! : t] = x[t]! * residuals[t]!;
    return out;
  };
  const observed = observedMask(scores);
  return { T, terms, weighted: weighted(regression), column, ...(observed ? { observed } : {}) };
}

/**
 * A series in the units of X: `loading` takes its coordinates to those of the orthonormal basis, and x_t = R'q_t takes those
 * to X. For the residuals of prewhitening.
 */
export function inRawUnits(
  regression: Regression,
  scores: Scores,
  series: Series,
  loading: Matrix,
): RawScores {
  const toX = multiply(transpose(inverse(scores.back)), loading);
  const { rows: n, columns: r } = series.columns;
  const column = (a: number): Float64Array => {
    const out = new Float64Array(n);
    for (let j = 0; j < r; j++) addTimes(out, toX.data[j * toX.rows + a]!, columnOf(series.columns, j));
    return out;
  };
  return { T: n, terms: regression.terms, weighted: weighted(regression), column };
}

/** One contrast's influence series as the only score. */
export function scalarScore(series: Float64Array, term: string, T: number, observed?: Uint8Array): RawScores {
  return { T, terms: [term], weighted: [true], column: () => series, ...(observed ? { observed } : {}) };
}

/** 1 at the calendar places of observed periods; undefined when all are. */
export function observedMask({ places, span }: Scores): Uint8Array | undefined {
  if (!places) return undefined;
  const observed = new Uint8Array(span);
  for (const place of places) observed[place] = 1;
  return observed;
}
