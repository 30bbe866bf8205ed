import type { Regression } from "../../estimate/index.js";
import { whichLags } from "../parts/lags.js";
import { chiSquaredTest, notComputed } from "../parts/laws.js";
import { addColumns, basisColumns, residualised } from "../parts/projection.js";
import { unitResiduals } from "../parts/residuals.js";
import { lagged } from "../parts/time.js";
import type { Test } from "../test.js";

/** The name used throughout for this test. */
export const robustName = "Robust LM";

/**
 * The test for serial correlation that unequal variances leave alone (Wooldridge 1991): with r̂ⱼ what the terms
 * leave of ê(t−j), T − SSR from regressing one on the ê·r̂ⱼ, against χ²(s), for the first 1, 2, ... of `lags`.
 */
export function robustLM(m: Regression, lags: readonly number[]): Test[] {
  const e = unitResiduals(m, "dependence");
  const basis = basisColumns(m.Q);
  const moments = lags.map((lag) => residualised(lagged(e, m.periods, lag), basis).map((r, t) => r * e[t]!));
  const { rss, rank } = addColumns(new Float64Array(m.T).fill(1), [], moments);
  return lags.map((_, i) => {
    const used = lags.slice(0, i + 1);
    const highest = Math.max(...used);
    const s = rank[i + 1]!;
    if (s === 0)
      return notComputed(robustName, "the lagged residuals are combinations of the terms", highest);
    return chiSquaredTest(robustName, m.T - rss[i + 1]!, s, { lags: highest, ...whichLags(used) });
  });
}
