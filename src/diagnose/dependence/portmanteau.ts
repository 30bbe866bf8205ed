import { chiSquaredTest, notComputed } from "../parts/laws.js";
import type { Test } from "../test.js";
import type { Correlations } from "./correlogram.js";

/**
 * Box–Pierce (1970), T Σ rⱼ², and Ljung–Box (1978), T(T+2) Σ rⱼ²/(T−j), for the lags 1 .. `lags`, against χ² with
 * `lags` less the number of `fitted` parameters of an ARMA error model. Strictly exogenous terms are assumed.
 * Across gaps each rⱼ² is weighed by its number of pairs, which without gaps gives the formulas above.
 */
export function portmanteau(
  { r, pairs, span, T }: Correlations,
  lags: number,
  fitted: number,
): { boxPierce: Test; ljungBox: Test } {
  const names = ["Box–Pierce", "Ljung–Box"] as const;
  const df = lags - fitted;
  const missing = pairs.subarray(0, lags).indexOf(0);
  if (df < 1 || missing >= 0 || Number.isNaN(r[0]!)) {
    const note =
      df < 1
        ? `${lags} lags with ${fitted} parameters of the error model fitted leave no degrees of freedom`
        : missing >= 0
          ? `no two residuals stand ${missing + 1} periods apart`
          : "the residuals do not vary about their mean";
    return { boxPierce: notComputed(names[0], note, lags), ljungBox: notComputed(names[1], note, lags) };
  }
  let boxPierce = 0;
  let ljungBox = 0;
  for (let j = 1; j <= lags; j++) {
    const n = pairs[j - 1]!;
    const untapered = (r[j - 1]! * span) / (span - j);
    boxPierce += (untapered ** 2 * n * n) / T;
    ljungBox += (untapered ** 2 * n * (T + 2)) / T;
  }
  const details = fitted > 0 ? { lags, note: `${fitted} parameters of the error model fitted` } : { lags };
  return {
    boxPierce: chiSquaredTest(names[0], boxPierce, df, details),
    ljungBox: chiSquaredTest(names[1], ljungBox, df, details),
  };
}
