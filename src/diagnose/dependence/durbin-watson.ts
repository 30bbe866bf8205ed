import type { Regression } from "../../estimate/index.js";
import { durbinWatsonTails } from "../../numeric/index.js";
import { notComputed } from "../parts/laws.js";
import { unitResiduals } from "../parts/residuals.js";
import { laggedProducts, rowsEarlier } from "../parts/time.js";
import { figure, pValue } from "../parts/words.js";
import type { Test } from "../test.js";

/** The Durbin–Watson test with both one-sided p-values; `p` is the two-sided one, twice the smaller. */
export interface DurbinWatson extends Test {
  /** P(d' < d): small when errors carry over with the same sign. */
  readonly pPositive: number;
  /** P(d' > d): small when they alternate. */
  readonly pNegative: number;
}

/**
 * Durbin and Watson (1950, 1951): d = Σ(ê(t) − ê(t−1))² / Σê², the upper sum over neighbouring periods only, with the
 * exact law given these terms and gaps under independent normal errors. With lagged outcomes among the terms that law
 * does not hold and the test is marked as not valid.
 */
export function durbinWatson(m: Regression): DurbinWatson {
  const e = unitResiduals(m, "dependence");
  const name = "Durbin–Watson";
  const before = rowsEarlier(m.periods, 1);
  let differences = 0;
  let pairs = 0;
  for (let t = 0; t < m.T; t++) {
    if (before[t]! < 0) continue;
    differences += (e[t]! - e[before[t]!]!) ** 2;
    pairs++;
  }
  if (pairs === 0 || m.T - m.k < 2)
    return {
      ...notComputed(
        name,
        pairs === 0 ? "no two periods are neighbours" : `T − k = ${m.T - m.k}: d cannot vary`,
        1,
      ),
      pPositive: Number.NaN,
      pNegative: Number.NaN,
    };
  const linked = Uint8Array.from(before, (row) => (row >= 0 ? 1 : 0));
  const d = differences / laggedProducts(e, e, m.periods, 0).sum;
  const { lower, upper } = durbinWatsonTails(d, m.Q, linked);
  const sides = `against positive ${pValue(lower)}, against negative ${pValue(upper)}`;
  const gaps = pairs < m.T - 1 ? `; ${pairs} pairs of neighbours in ${m.T} periods` : "";
  return {
    name,
    lags: 1,
    statistic: d,
    df: [],
    distribution: "exact, normal errors",
    p: Math.min(1, 2 * Math.min(lower, upper)),
    valid: !m.laggedOutcome,
    note: m.laggedOutcome
      ? "lagged outcomes among the terms pull d towards 2: arithmetic only"
      : `${sides}${gaps}`,
    pPositive: lower,
    pNegative: upper,
  };
}

/**
 * Von Neumann's (1941) ratio [Σ(ê(t)−ê(t−1))²/pairs] / [Σ(ê−mean)²/T]. With a constant among the terms it is a multiple
 * of d and has its p-value; without one it is not computed here.
 */
export function vonNeumann(m: Regression, dw: DurbinWatson, withConstant: boolean): Test {
  const name = "Von Neumann ratio";
  if (Number.isNaN(dw.statistic)) return notComputed(name, dw.note ?? "");
  if (!withConstant) return notComputed(name, "no constant among the terms: see Durbin–Watson");
  let pairs = 0;
  for (const row of rowsEarlier(m.periods, 1)) if (row >= 0) pairs++;
  return {
    name,
    lags: 1,
    statistic: (dw.statistic * m.T) / pairs,
    df: [],
    distribution: dw.distribution,
    p: dw.p,
    valid: dw.valid,
    note: m.laggedOutcome
      ? "lagged outcomes among the terms: arithmetic only"
      : `a multiple of d = ${figure(dw.statistic)}`,
  };
}
