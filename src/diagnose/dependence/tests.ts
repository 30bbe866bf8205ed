import type { Regression } from "../../estimate/index.js";
import { spansConstant, unitResiduals } from "../parts/residuals.js";
import type { Test } from "../test.js";
import { arch } from "./arch.js";
import { breuschGodfrey } from "./breusch-godfrey.js";
import type { Correlations } from "./correlogram.js";
import { cumbyHuizinga } from "./cumby-huizinga.js";
import { durbinAlternative } from "./durbin-alternative.js";
import { durbinWatson, vonNeumann } from "./durbin-watson.js";
import type { LagChoice } from "./lag-choice.js";
import { portmanteau } from "./portmanteau.js";
import { robustLM } from "./robust-lm.js";
import { runs } from "./runs.js";

/** The tests of dependence that lags decide, grouped by what they are for. */
export interface LagTestGroups {
  /** The Breusch–Godfrey F tests a finding may rest on: joint ones by ascending order, then seasonal lags alone. */
  readonly plain: readonly Test[];
  /** Their counterparts robust to uneven variance, in the same order. */
  readonly robust: readonly Test[];
  /** All of them, in the order of a card. */
  readonly all: readonly Test[];
}

/** Every test of dependence but the cumulative periodogram; `values` are the residuals the portmanteau tests take. */
export function dependenceTests(
  m: Regression,
  lags: LagChoice,
  correlations: Correlations,
  values: Float64Array,
  fitted: number,
): LagTestGroups {
  const upTo = Array.from({ length: lags.highest }, (_, i) => i + 1);
  const godfrey = breuschGodfrey(m, upTo);
  const robustAll = robustLM(m, upTo);
  const joint = lags.orders.map((order) => godfrey[order - 1]!);
  const seasonal = lags.seasonal.map((lag) => breuschGodfrey(m, [lag])[0]!);
  const plain = [...joint, ...seasonal].map((pair) => pair.F);
  const robust = [
    ...lags.orders.map((order) => robustAll[order - 1]!),
    ...lags.seasonal.map((lag) => robustLM(m, [lag])[0]!),
  ];
  const dw = durbinWatson(m);
  const box = lags.orders.map((order) => portmanteau(correlations, order, fitted));
  const past = Math.min(lags.highest - 1, 4);
  const beyond = past > 0 && m.T - m.k > 5 * (past + 1) ? [cumbyHuizinga(m, 1, past)] : [];
  const archLags = [...new Set([1, lags.highest])];
  const all = [
    dw,
    ...(m.laggedOutcome ? [durbinAlternative(m)] : []),
    ...plain,
    ...[...joint, ...seasonal].map((pair) => pair.LM),
    ...robust,
    ...box.map((pair) => arithmeticOnly(pair.ljungBox, m)),
    ...box.map((pair) => arithmeticOnly(pair.boxPierce, m)),
    ...beyond,
    vonNeumann(m, dw, spansConstant(m)),
    runs(values),
    ...archLags.map((q) => arch(unitResiduals(m, "dependence"), m.periods, q)),
  ];
  return { plain, robust, all };
}

function arithmeticOnly(test: Test, m: Regression): Test {
  if (!m.laggedOutcome || Number.isNaN(test.statistic)) return test;
  return { ...test, valid: false, note: "not χ² with lagged outcomes among the terms: arithmetic only" };
}
