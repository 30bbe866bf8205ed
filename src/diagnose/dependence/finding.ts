import { holm } from "../parts/holm.js";
import { figure, stated } from "../parts/words.js";
import type { Test } from "../test.js";
import type { Inflation } from "./inflation.js";

/** What the tests come to. */
export interface Verdict {
  /** Whether some test of the family rejects independence after Holm's adjustment at 1 − level. */
  readonly dependent: boolean;
  /** Smallest p of the family after Holm's adjustment; NaN where none could be computed. */
  readonly p: number;
  /** The test the finding rests on: the one with the smallest p of the family. */
  readonly decisive: Test | undefined;
  readonly finding: string;
}

/** Weighs a family of tests (joint lags, seasonal lags alone) and words the finding. */
export function verdict(
  family: readonly Test[],
  correlation: number,
  inflation: Inflation,
  level: number,
  period: string,
  interceptAt: number,
): Verdict {
  const known = family.filter((test) => !Number.isNaN(test.p));
  if (known.length === 0)
    return {
      dependent: false,
      p: Number.NaN,
      decisive: undefined,
      finding: `Too few degrees of freedom to test for dependence; the correlation of neighbouring residuals is ${figure(correlation, 2)}.`,
    };
  const adjusted = holm(known.map((test) => test.p));
  const strongest = known.reduce((best, test, i) => (test.p < known[best]!.p ? i : best), 0);
  const decisive = known[strongest]!;
  const p = adjusted[strongest]!;
  const dependent = p < 1 - level;
  if (!dependent) {
    const widest = known.reduce((a, b) =>
      (b.lags ?? 0) > (a.lags ?? 0) && !b.note?.includes("alone") ? b : a,
    );
    return {
      dependent,
      p,
      decisive,
      finding:
        `No dependence found in the residuals: correlation ${figure(correlation, 2)} from one ${period} to the next; ` +
        `${wording(widest)}.`,
    };
  }
  const neighbours = known.some((test) => test.lags === 1 && test.p < 1 - level);
  const how = correlation < 0 ? "alternate" : "carry over";
  const lead = decisive.note?.includes("alone")
    ? `Residuals depend on those ${decisive.lags} ${period}s earlier`
    : neighbours
      ? `Residuals ${how} from one ${period} to the next, with correlation ${figure(correlation, 2)}`
      : `Residuals depend on their past within ${decisive.lags} ${period}s`;
  return {
    dependent,
    p,
    decisive,
    finding: `${lead}; ${wording(decisive)}.${consequence(inflation, interceptAt)}`,
  };
}

function wording(test: Test): string {
  const which = test.note?.includes("alone")
    ? `at lag ${test.lags} alone`
    : test.lags === 1
      ? "at lag 1"
      : `over lags 1–${test.lags}`;
  return `${test.name} ${which}: ${stated(test)}`;
}

function consequence(inflation: Inflation, interceptAt: number): string {
  const slopes = inflation.factors.filter((_, j) => j !== interceptAt);
  if (inflation.order === 0 || slopes.length === 0) return "";
  const ordered = [...slopes].sort((a, b) => a.factor - b.factor);
  const least = ordered[0]!;
  const most = ordered[ordered.length - 1]!;
  const size = (one: typeof least) => `${figure(one.factor, 2)} (${one.term})`;
  const range =
    least === most
      ? `the variance of ${most.term} by ${figure(most.factor, 2)}`
      : `by ${size(least)} to ${size(most)}`;
  const what = least === most ? "multiplies" : "multiplies the variances of the coefficients";
  return ` An AR(${inflation.order}) in the residuals ${what} ${range} against independent errors.`;
}
