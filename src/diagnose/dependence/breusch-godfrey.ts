import type { Regression } from "../../estimate/index.js";
import { whichLags } from "../parts/lags.js";
import { chiSquaredTest, fisherTest, notComputed } from "../parts/laws.js";
import { addColumns, basisColumns } from "../parts/projection.js";
import { unitResiduals } from "../parts/residuals.js";
import { lagged } from "../parts/time.js";
import type { Test } from "../test.js";

/**
 * Breusch (1978) and Godfrey (1978): the residuals regressed on the terms and on their own values at `lags`,
 * zero where that period has no row (before the sample, in a gap). Valid with lagged outcomes.
 *
 * Returns, for the first 1, 2, ... of the lags together, the F form ((RSS₀ − RSS)/s)/(RSS/(T−k−s)) against
 * F(s, T−k−s) and T·R² (R² about zero) against χ²(s).
 */
export function breuschGodfrey(m: Regression, lags: readonly number[]): { F: Test; LM: Test }[] {
  const e = unitResiduals(m, "dependence");
  const past = lags.map((lag) => lagged(e, m.periods, lag));
  const { rss, rank } = addColumns(e, basisColumns(m.Q), past);
  return lags.map((_, i) => {
    const order = i + 1;
    const s = rank[order]!;
    const rest = m.T - m.k - s;
    const highest = Math.max(...lags.slice(0, order));
    const details = { lags: highest, ...whichLags(lags.slice(0, order)) };
    if (s === 0 || rest < 1) {
      const note = `T − k = ${m.T - m.k} leaves no degrees of freedom with ${order} lagged residuals`;
      return {
        F: notComputed("Breusch–Godfrey F", note, highest),
        LM: notComputed("Breusch–Godfrey LM", note, highest),
      };
    }
    const F = (rss[0]! - rss[order]!) / s / (rss[order]! / rest);
    return {
      F: fisherTest("Breusch–Godfrey F", F, s, rest, details),
      LM: chiSquaredTest("Breusch–Godfrey LM", m.T * (1 - rss[order]! / rss[0]!), s, details),
    };
  });
}
