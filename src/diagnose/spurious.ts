import type { Remark } from "../data/index.js";
import type { Regression } from "../estimate/index.js";
import { columnOf, InputError } from "../numeric/index.js";
import { dickeyFuller } from "./integration/dickey-fuller.js";
import { shortLags } from "./integration/phillips-perron.js";
import { mostSeries, unitRootLower } from "./integration/unit-root-law.js";
import { takesMoreThan } from "./parts/distinct.js";
import { isPerfectFit, spansConstant } from "./parts/residuals.js";
import { hasGaps } from "./parts/time.js";
import { figure, pValue } from "./parts/words.js";

/** What sets off the alarm. */
export interface Spurious {
  readonly durbinWatson: number;
  readonly rSquared: number;
  /** p of the unit root of the residuals, Engle–Granger law. */
  readonly p: number;
  readonly remark: Remark;
}

/**
 * The signs of a regression between integrated series that have nothing to do with one another (Granger and Newbold 1974; Phillips
 * 1986). It takes all of these: d below one; an R² above d or a term with a classical |t| of 2; and a unit root that is not
 * rejected at 10 % in the outcome, in such a term, and in the residuals by the Engle–Granger law for as many series as there are
 * terms that are neither linear in time nor two-valued. Nothing for lagged outcomes, gaps, fewer than 20 periods or no constant.
 * O(T k) unless d < 1.
 */
export function spuriousAlarm(m: Regression): Spurious | undefined {
  if (m.laggedOutcome || m.T < 20 || hasGaps(m.periods) || isPerfectFit(m) || !spansConstant(m))
    return undefined;
  const e = m.residuals;
  let differences = 0;
  for (let t = 1; t < m.T; t++) differences += (e[t]! - e[t - 1]!) ** 2;
  const durbinWatson = differences / m.rss;
  if (!(durbinWatson < 1)) return undefined;
  const mean = m.y.reduce((sum, y) => sum + y / m.T, 0);
  const rSquared = 1 - m.rss / m.y.reduce((sum, y) => sum + (y - mean) ** 2, 0);
  const { moving, trend } = movingTerms(m);
  if (moving.length === 0) return undefined;
  const kind = trend ? "trend" : "constant";
  const s2 = m.rss / (m.T - m.k);
  const telling = moving.filter((j) => {
    const t = m.coefficients[j]! / Math.sqrt(s2 * m.gramInverse.data[j * m.k + j]!);
    return durbinWatson < rSquared || Math.abs(t) > 2;
  });
  if (telling.length === 0) return undefined;
  const stands = (x: Float64Array) => unitRoot(x, kind, 1) >= 0.1;
  const p = unitRoot(e, kind, Math.min(moving.length + 1, mostSeries));
  if (!(p >= 0.1) || !stands(m.y) || !telling.some((j) => stands(columnOf(m.X, j)))) return undefined;
  return {
    durbinWatson,
    rSquared,
    p,
    remark: {
      severity: "caution",
      text:
        `The fit may be spurious: R² ${figure(rSquared)} beside a Durbin–Watson of ${figure(durbinWatson)}, and residuals in which a unit root is ` +
        `not rejected (Engle–Granger ${pValue(p)}). See integration(...) of its columns, or fit differences.`,
    },
  };
}

/** Terms that are neither linear in time nor two-valued, and whether a linear one is among the rest. */
function movingTerms(m: Regression): { moving: number[]; trend: boolean } {
  const moving: number[] = [];
  let trend = false;
  for (let j = 0; j < m.k; j++) {
    const x = columnOf(m.X, j);
    if (isLinear(x)) trend ||= x[0] !== x[1];
    else if (takesMoreThan(2, x)) moving.push(j);
  }
  return { moving, trend };
}

/** p of a unit root, with short lags; 0 where the series allows no such test. `series` above one: residuals of a relation. */
function unitRoot(x: Float64Array, kind: "constant" | "trend", series: number): number {
  const lags = Math.min(4, shortLags(x.length));
  try {
    const { tau, n } = dickeyFuller(x, series === 1 ? kind : "none", lags, "fit");
    return unitRootLower(tau, n, kind, series);
  } catch (problem) {
    if (problem instanceof InputError) return 0;
    throw problem;
  }
}

function isLinear(x: Float64Array): boolean {
  const step = x[1]! - x[0]!;
  let largest = 0;
  for (const v of x) largest = Math.max(largest, Math.abs(v));
  for (let t = 1; t < x.length; t++) if (Math.abs(x[t]! - x[t - 1]! - step) > 1e-9 * largest) return false;
  return true;
}
