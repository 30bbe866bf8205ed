import { chiSquaredTest, notComputed } from "../parts/laws.js";
import { addColumns } from "../parts/projection.js";
import { rowsEarlier } from "../parts/time.js";
import type { Test } from "../test.js";

const name = "ARCH LM";

/**
 * Engle (1982): squares of `values` on a constant and their own `lags` past values, over the rows for which all of
 * those are there; rows × R² against χ²(lags). Serial correlation of the values themselves also moves it.
 */
export function arch(values: Float64Array, periods: Float64Array, lags: number): Test {
  const earlier = Array.from({ length: lags }, (_, i) => rowsEarlier(periods, i + 1));
  const rows: number[] = [];
  for (let t = 0; t < values.length; t++) if (earlier.every((at) => at[t]! >= 0)) rows.push(t);
  const n = rows.length;
  if (n - lags - 1 < 1)
    return notComputed(name, `only ${n} periods have all of the ${lags} periods before them`, lags);
  const square = (t: number) => values[t]! ** 2;
  const constant = new Float64Array(n).fill(1 / Math.sqrt(n));
  const target = Float64Array.from(rows, square);
  const past = earlier.map((at) => Float64Array.from(rows, (t) => square(at[t]!)));
  const { rss, rank } = addColumns(target, [constant], past);
  const df = rank[lags]!;
  if (df === 0 || !(rss[0]! > 0)) return notComputed(name, "the squared residuals do not vary", lags);
  const note = n < values.length - lags ? { note: `${n} periods used: the rest follow a gap` } : {};
  return chiSquaredTest(name, n * (1 - rss[lags]! / rss[0]!), df, { lags, ...note });
}
