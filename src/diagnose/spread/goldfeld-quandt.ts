import type { Regression } from "../../estimate/index.js";
import { columnOf, fisher } from "../../numeric/index.js";
import { notComputed } from "../parts/laws.js";
import { addColumns } from "../parts/projection.js";
import type { Test } from "../test.js";

/**
 * Goldfeld and Quandt (1965): the terms refitted on the earliest and on the latest periods (or the rows with the lowest
 * and highest values of `by`), the middle fifth left out; the ratio of the residual variances, late over early, against
 * F, two-sided. Exact for normal independent errors.
 */
export function goldfeldQuandt(m: Regression, by?: { label: string; values: Float64Array }): Test {
  const name = "Goldfeld–Quandt";
  const rows = Array.from({ length: m.T }, (_, t) => t);
  if (by) rows.sort((a, b) => by.values[a]! - by.values[b]! || a - b);
  const each = Math.floor((m.T - Math.floor(m.T / 5)) / 2);
  const low = part(m, rows.slice(0, each));
  const high = part(m, rows.slice(m.T - each));
  const note = by ? `highest against lowest ${by.label}` : "late against early periods";
  if (low.df < 1 || high.df < 1)
    return notComputed(name, `${each} periods a side are too few for ${m.k} coefficients`);
  if (!(low.rss > 0) || !(high.rss > 0)) return notComputed(name, "one side is fitted exactly");
  const ratio = high.rss / high.df / (low.rss / low.df);
  const p = Math.min(
    1,
    2 * Math.min(fisher.upper(ratio, high.df, low.df), fisher.upper(1 / ratio, low.df, high.df)),
  );
  return {
    name,
    statistic: ratio,
    df: [high.df, low.df],
    distribution: `F(${high.df}, ${low.df})`,
    p,
    valid: !m.laggedOutcome,
    note: m.laggedOutcome ? `${note}; exact only without lagged outcomes` : note,
  };
}

function part(m: Regression, rows: readonly number[]): { rss: number; df: number } {
  const pick = (values: Float64Array) => Float64Array.from(rows, (t) => values[t]!);
  const y = pick(m.y);
  const columns = Array.from({ length: m.k }, (_, j) => pick(columnOf(m.X, j)));
  const { rss, rank } = addColumns(y, [], columns);
  const left = rss[m.k]!;
  const total = y.reduce((sum, v) => sum + v * v, 0);
  const exact = left <= (rows.length * 2 ** -52) ** 2 * total;
  return { rss: exact ? 0 : left, df: rows.length - rank[m.k]! };
}
