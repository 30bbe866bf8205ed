import type { Regression } from "../../estimate/index.js";
import { notComputed, studentTest } from "../parts/laws.js";
import { basisColumns, residualised } from "../parts/projection.js";
import { unitResiduals } from "../parts/residuals.js";
import { lagged } from "../parts/time.js";
import type { Test } from "../test.js";

const name = "Durbin's alternative";

/**
 * Durbin's (1970) regression for models with lagged outcomes: the t ratio of ê(t−1) when the residuals are
 * regressed on the terms and ê(t−1), against t(T−k−1). Its square is the Breusch–Godfrey F at lag 1; the sign
 * tells which way the errors carry over.
 */
export function durbinAlternative(m: Regression): Test {
  const e = unitResiduals(m, "dependence");
  const df = m.T - m.k - 1;
  if (df < 1) return notComputed(name, `T − k = ${m.T - m.k} leaves no degrees of freedom`, 1);
  const past = residualised(lagged(e, m.periods, 1), basisColumns(m.Q));
  let square = 0;
  let product = 0;
  let total = 0;
  for (let t = 0; t < m.T; t++) {
    square += past[t]! ** 2;
    product += past[t]! * e[t]!;
    total += e[t]! ** 2;
  }
  if (square < 1e-18 * total) return notComputed(name, "ê(t−1) is a combination of the terms", 1);
  const rest = total - product ** 2 / square;
  return studentTest(name, product / Math.sqrt((square * rest) / df), df, { lags: 1 });
}
