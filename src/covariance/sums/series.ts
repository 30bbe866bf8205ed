import { columnOf, type Matrix } from "../../numeric/index.js";
import type { Scores } from "../scores.js";

/** A vector series over n periods: row t is `columns` at t, times `multiplier` at t where there is one. */
export interface Series {
  readonly columns: Matrix;
  readonly multiplier?: Float64Array;
}

const known = new WeakMap<Scores, Series>();

/** q_t û_t as a series. The same object every time, so that what is found out about it can be kept. */
export function scoreSeries(scores: Scores): Series {
  let series = known.get(scores);
  if (!series) {
    series = { columns: scores.basis, multiplier: scores.residuals };
    known.set(scores, series);
  }
  return series;
}

/** Copies rows from…to of one column, multiplied, to `out` at `at`. Rows outside the series are zero. */
export function copyRows(
  { columns, multiplier }: Series,
  column: number,
  from: number,
  to: number,
  out: Float64Array,
  at: number,
): void {
  const values = columnOf(columns, column);
  const start = Math.max(from, 0);
  const end = Math.min(to, columns.rows);
  if (start > from) out.fill(0, at, at + Math.min(start, to) - from);
  if (multiplier) for (let t = start; t < end; t++) out[at + t - from] = values[t]! * multiplier[t]!;
  else for (let t = start; t < end; t++) out[at + t - from] = values[t]!;
  if (end < to) out.fill(0, at + Math.max(end, from) - from, at + to - from);
}
