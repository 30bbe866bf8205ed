import type { Regression } from "../../estimate/index.js";
import { unitResiduals } from "../parts/residuals.js";
import { breuschGodfrey } from "./breusch-godfrey.js";
import type { Correlations } from "./correlogram.js";
import { cumbyHuizinga } from "./cumby-huizinga.js";
import { portmanteau } from "./portmanteau.js";
import { robustLM } from "./robust-lm.js";

/** p-values at one lag. */
export interface LagTests {
  readonly lag: number;
  /** Breusch–Godfrey F, lags 1 up to this. */
  readonly breuschGodfrey: number;
  /** Robust LM, lags 1 up to this. */
  readonly robust: number;
  /** Ljung–Box, lags 1 up to this; arithmetic only where lagged outcomes are among the terms. */
  readonly ljungBox: number;
  /** Cumby–Huizinga: this lag alone, whatever happens at shorter ones. */
  readonly alone: number;
}

/** The tests at each lag 1 .. `highest`, for one chart. */
export function testsByLag(
  m: Regression,
  highest: number,
  correlations: Correlations,
  fitted: number,
): LagTests[] {
  unitResiduals(m, "dependence");
  const lags = Array.from({ length: highest }, (_, i) => i + 1);
  const godfrey = breuschGodfrey(m, lags);
  const robust = robustLM(m, lags);
  return lags.map((lag, i) => ({
    lag,
    breuschGodfrey: godfrey[i]!.F.p,
    robust: robust[i]!.p,
    ljungBox: portmanteau(correlations, lag, fitted).ljungBox.p,
    alone: cumbyHuizinga(m, lag - 1, 1).p,
  }));
}
