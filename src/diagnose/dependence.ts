import { seasonLength, stepName } from "../data/index.js";
import { correlogramBands } from "./dependence/bands.js";
import { type LagTests, testsByLag } from "./dependence/by-lag.js";
import { autocorrelations, partialAutocorrelations } from "./dependence/correlogram.js";
import { type CumulativePeriodogram, cumulativePeriodogram } from "./dependence/cumulative-periodogram.js";
import { verdict } from "./dependence/finding.js";
import { type Inflation, varianceInflation } from "./dependence/inflation.js";
import { innovationSpread } from "./dependence/innovations.js";
import { chooseLags } from "./dependence/lag-choice.js";
import { dependenceRemarks } from "./dependence/remarks.js";
import { dependenceTests } from "./dependence/tests.js";
import { about, Diagnostic, type DiagnosticFields } from "./diagnostic.js";
import { centred, spansConstant, unitResiduals } from "./parts/residuals.js";
import type { Fitted } from "./subject.js";
import type { Test } from "./test.js";

/** Options of `dependence`. */
export interface DependenceOptions {
  /** Highest lag of the joint tests, or the highest lags of several; default in `chooseLags`. At most T − k − 1. */
  readonly lags?: number | readonly number[];
  /** Periods in a season; default: what the step of the time axis suggests (12 for months, 4 for quarters, ...). */
  readonly season?: number;
  /** Parameters of an ARMA error model that was fitted, taken off the degrees of freedom of Ljung–Box. Default 0. */
  readonly fitted?: number;
}

/** One lag of a correlogram. */
export interface CorrelogramPoint {
  readonly lag: number;
  readonly value: number;
  /** White-noise band about zero. */
  readonly low: number;
  readonly high: number;
  /** Half-width of the band by Bartlett's formula (autocorrelations only). */
  readonly bartlett?: number;
  /** Half-width of the band that allows for uneven variance (autocorrelations only). */
  readonly uneven?: number;
}

interface DependenceFields extends DiagnosticFields {
  /** Whether the family of tests that fits this model rejects independence (Holm, at 1 − level). */
  readonly dependent: boolean;
  /** Smallest p of that family after the adjustment. */
  readonly p: number;
  /** The test the finding rests on. */
  readonly decisive: Test | undefined;
  /** Autocorrelations of the residuals. */
  readonly acf: readonly CorrelogramPoint[];
  /** Partial autocorrelations of the residuals. */
  readonly pacf: readonly CorrelogramPoint[];
  readonly byLag: readonly LagTests[];
  readonly periodogram: CumulativePeriodogram;
  readonly inflation: Inflation;
}

/** Whether the past still shows in the residuals of a fit. */
export class Dependence extends Diagnostic implements DependenceFields {
  override readonly kind = "dependence";
  declare readonly dependent: boolean;
  declare readonly p: number;
  declare readonly decisive: Test | undefined;
  declare readonly acf: readonly CorrelogramPoint[];
  declare readonly pacf: readonly CorrelogramPoint[];
  declare readonly byLag: readonly LagTests[];
  declare readonly periodogram: CumulativePeriodogram;
  declare readonly inflation: Inflation;

  constructor(fields: DependenceFields) {
    super();
    Object.assign(this, fields);
    Object.freeze(this);
  }
}

/**
 * Tests whether the residuals of `m` still depend on their past, by the tests that fit the model: Breusch–Godfrey and its
 * form robust to uneven variance, the exact Durbin–Watson, Ljung–Box and Box–Pierce (the last three not valid with
 * lagged outcomes, and marked so), Durbin's alternative, Cumby–Huizinga, runs, von Neumann, the cumulative periodogram
 * and ARCH. The finding rests on Breusch–Godfrey, or on the robust form where the variance is uneven.
 *
 * Lagged products are taken in time: rows across a gap are not neighbours. Throws an InputError for a perfect fit and
 * for lags at or above T − k.
 */
export function dependence(m: Fitted, options: DependenceOptions = {}): Dependence {
  const regression = m.regression;
  const { T, k, periods } = regression;
  const { level, design } = m;
  const fitted = options.fitted ?? 0;
  const e = unitResiduals(regression, "dependence");
  const constant = spansConstant(regression);
  const values = constant ? e : centred(e);
  const lags = chooseLags(T, k, options.season ?? seasonLength(design.index.step), options.lags);
  const correlations = autocorrelations(values, periods, lags.shown);
  const bands = correlogramBands(values, periods, correlations, level);
  const partial = partialAutocorrelations(correlations.r).values;
  const groups = dependenceTests(regression, lags, correlations, values, fitted);
  const periodogram = cumulativePeriodogram(values, periods, level);
  const spread = innovationSpread(regression, lags.highest, 1 - level);
  const inflation = varianceInflation(regression, values);
  const found = verdict(
    spread.uneven ? groups.robust : groups.plain,
    correlations.r[0]!,
    inflation,
    level,
    stepName(design.index.step),
    regression.interceptAt,
  );
  const point = (r: number, i: number) => ({
    lag: i + 1,
    value: r,
    low: -bands.white[i]!,
    high: bands.white[i]!,
  });
  return new Dependence({
    ...about(m),
    tests: [...groups.all, periodogram.test, ...spread.tests],
    dependent: found.dependent,
    p: found.p,
    decisive: found.decisive,
    acf: Array.from(correlations.r, (r, i) => ({
      ...point(r, i),
      bartlett: bands.bartlett[i]!,
      uneven: bands.uneven[i]!,
    })),
    pacf: Array.from(partial, point),
    byLag: testsByLag(regression, lags.highest, correlations, fitted),
    periodogram,
    inflation,
    finding: found.finding,
    remarks: dependenceRemarks(regression, { constant, uneven: spread, partial, dependent: found.dependent }),
  });
}
