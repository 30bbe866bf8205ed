import type { Test } from "../test.js";
import { unitRootLower } from "./unit-root-law.js";

/** The t ratio of residuals of a relation between `series` columns, against Engle and Granger's law. */
export function engleGranger(
  tau: number,
  n: number,
  lags: number,
  kind: "constant" | "trend",
  series: number,
): Test {
  return {
    name: "Engle–Granger",
    lags,
    statistic: tau,
    df: [],
    distribution: `Engle–Granger, ${series} series, ${kind}`,
    p: unitRootLower(tau, n, kind, series),
    valid: true,
    note: `${lags} lagged differences, ${n} periods`,
  };
}
