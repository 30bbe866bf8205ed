import type { Regression } from "../../estimate/index.js";
import { autocorrelations } from "../dependence/correlogram.js";
import { kolmogorovLimitUpper } from "../laws/kolmogorov-limit.js";
import { notComputed } from "../parts/laws.js";
import type { Test } from "../test.js";

/**
 * Cumulated least-squares residuals (Ploberger and Krämer 1992) over √T times their long-run standard deviation, so that
 * dependence does not pass for a break: Bartlett weights at Andrews' AR(1) bandwidth. Against the Brownian bridge, which needs
 * a constant among the terms and the others stationary.
 */
export function residualCusum(m: Regression, hasConstant: boolean): Test {
  const name = "CUSUM of residuals, robust";
  if (!hasConstant) return notComputed(name, "no constant among the terms");
  const { T, residuals } = m;
  const { r } = autocorrelations(residuals, m.periods, Math.min(T - 1, Math.floor(T / 4)));
  const reach = dependenceReach(r[0]!, T);
  let ratio = 1;
  for (let j = 1; j < reach; j++) if (r[j - 1]! * r[j - 1]! >= 0) ratio += 2 * (1 - j / reach) * r[j - 1]!;
  if (!(ratio > 0)) return notComputed(name, "the long-run variance of the residuals is not positive");
  const s = Math.sqrt((m.rss / T) * ratio * T);
  let sum = 0;
  let most = 0;
  for (const e of residuals) {
    sum += e;
    most = Math.max(most, Math.abs(sum));
  }
  const statistic = most / s;
  return {
    name,
    statistic,
    df: [],
    distribution: "Brownian bridge",
    p: kolmogorovLimitUpper(statistic),
    valid: true,
    note: `long-run variance with Bartlett bandwidth ${reach}`,
  };
}

/** Bartlett bandwidth by Andrews' (1991) AR(1) plug-in on a residual autocorrelation: whole, at least 1, at most T/4. */
export function dependenceReach(rho: number, T: number): number {
  const r = Math.max(-0.97, Math.min(0.97, rho));
  const alpha = (4 * r * r) / ((1 - r) ** 2 * (1 + r) ** 2);
  return Math.max(1, Math.min(Math.floor(T / 4), Math.round(1.1447142425533319 * (alpha * T) ** (1 / 3))));
}
