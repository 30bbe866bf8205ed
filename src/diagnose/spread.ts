import { arch } from "./dependence/arch.js";
import { breuschGodfrey } from "./dependence/breusch-godfrey.js";
import { chooseLags } from "./dependence/lag-choice.js";
import { about, Diagnostic, type DiagnosticFields } from "./diagnostic.js";
import { holm } from "./parts/holm.js";
import { unitResiduals } from "./parts/residuals.js";
import { termAt } from "./parts/term-at.js";
import { figure, pValue, stated } from "./parts/words.js";
import { breuschPagan } from "./spread/breusch-pagan.js";
import { goldfeldQuandt } from "./spread/goldfeld-quandt.js";
import { type Scale, scaleBy } from "./spread/paths.js";
import { robustSpread } from "./spread/robust.js";
import { white, whiteOnFitted } from "./spread/white.js";
import type { Fitted } from "./subject.js";
import type { Test } from "./test.js";

/** Options of `spread`. */
export interface SpreadOptions {
  /** Lags of the ARCH test; default 1 and what `dependence` would look at. */
  readonly lags?: number;
  /** Term by which Goldfeld–Quandt orders the rows beside time. */
  readonly by?: string;
}

interface SpreadFields extends DiagnosticFields {
  /** Whether the tests that fit the model reject an even spread (Holm, at 1 − level). */
  readonly uneven: boolean;
  /** Smallest p of those tests after the adjustment; NaN where none could be computed. */
  readonly p: number;
  readonly decisive: Test | undefined;
  /** Whether the residuals depend on their past, so that `decisive` is of the form robust to that. */
  readonly dependent: boolean;
  /** Size of the residuals over time, `at` in periods, in the outcome's unit. */
  readonly overTime: readonly Scale[];
  /** Size of the residuals over the fitted values. */
  readonly overFitted: readonly Scale[];
}

/** Whether the residuals of a fit are of one size throughout. */
export class Spread extends Diagnostic implements SpreadFields {
  override readonly kind = "spread";
  declare readonly uneven: boolean;
  declare readonly p: number;
  declare readonly decisive: Test | undefined;
  declare readonly dependent: boolean;
  declare readonly overTime: readonly Scale[];
  declare readonly overFitted: readonly Scale[];

  constructor(fields: SpreadFields) {
    super();
    Object.assign(this, fields);
    Object.freeze(this);
  }
}

/**
 * Tests whether the residuals of `m` are of one size: against the terms (Koenker, Breusch–Pagan, White), over time
 * (Goldfeld–Quandt) and against their own recent size (ARCH). The finding weighs Koenker, Goldfeld–Quandt and ARCH; where
 * the residuals depend on their past, which moves all three, it weighs the form robust to dependence instead.
 * Throws an InputError for a perfect fit or an unknown term in `by`.
 */
export function spread(m: Fitted, options: SpreadOptions = {}): Spread {
  const r = m.regression;
  const e = unitResiduals(r, "spread");
  const lags = chooseLags(r.T, r.k, undefined, options.lags).highest;
  const pagan = breuschPagan(r);
  const robust = robustSpread(r);
  const quandt = goldfeldQuandt(r);
  const archTests = [...new Set([1, lags])].map((q) => arch(e, r.periods, q));
  const godfrey = breuschGodfrey(
    r,
    Array.from({ length: lags }, (_, i) => i + 1),
  )[lags - 1]!.F;
  const dependent = godfrey.p < 1 - m.level;
  const marked = (test: Test): Test =>
    dependent && !Number.isNaN(test.p)
      ? { ...test, note: [test.note, "dependent residuals move it too"].filter(Boolean).join("; ") }
      : test;
  const family = dependent && !Number.isNaN(robust.p) ? [robust] : [pagan.koenker, quandt, archTests[0]!];
  const known = family.filter((test) => !Number.isNaN(test.p));
  const adjusted = holm(known.map((test) => test.p));
  const decisive = known.length === 0 ? undefined : known.reduce((a, b) => (b.p < a.p ? b : a));
  const p = known.length === 0 ? Number.NaN : Math.min(...adjusted);
  const uneven = p < 1 - m.level;
  const fitted = r.y.map((y, t) => y - r.residuals[t]!);
  const overTime = scaleBy(r.residuals, r.periods);
  const overFitted = scaleBy(r.residuals, fitted);
  return new Spread({
    ...about(m),
    tests: [
      ...[pagan.koenker, pagan.koenkerF, pagan.breuschPagan, white(r), whiteOnFitted(r)].map(marked),
      robust,
      ...[quandt, ...byTerm(m, options.by)].map(marked),
      ...archTests.map(marked),
    ],
    uneven,
    p,
    decisive,
    dependent,
    overTime,
    overFitted,
    finding: finding(uneven, decisive, overTime, overFitted),
    remarks: dependent
      ? [
          {
            severity: "note",
            text: `The residuals depend on their past (Breusch–Godfrey F over lags 1–${lags}, ${pValue(godfrey.p)}), which moves the usual tests of spread: the finding rests on the form robust to dependence.`,
          },
        ]
      : [],
  });
}

function finding(
  uneven: boolean,
  decisive: Test | undefined,
  overTime: readonly Scale[],
  overFitted: readonly Scale[],
): string {
  if (!decisive) return "Too few periods to test whether the residuals' size is even.";
  const test = `${decisive.name}: ${stated(decisive)}`;
  if (!uneven) return `No unevenness found in the size of the residuals; ${test}.`;
  const early = half(overTime, 0);
  const late = half(overTime, 1);
  const low = half(overFitted, 0);
  const high = half(overFitted, 1);
  const time = `${figure(late / early, 2)} times as large in the later half as in the earlier`;
  const level = `${figure(high / low, 2)} times as large where the fitted values are high as where they are low`;
  return `The size of the residuals is uneven: ${time}, ${level}; ${test}.`;
}

function half(path: readonly Scale[], which: 0 | 1): number {
  const middle = Math.ceil(path.length / 2);
  const stretch = which === 0 ? path.slice(0, middle) : path.slice(path.length - middle);
  const n = stretch.reduce((sum, s) => sum + s.n, 0);
  return Math.sqrt(stretch.reduce((sum, s) => sum + s.n * s.size ** 2, 0) / n);
}

function byTerm(m: Fitted, by: string | undefined): Test[] {
  if (by === undefined) return [];
  const at = termAt(m.regression.terms, by, "spread");
  const { X, T } = m.regression;
  return [goldfeldQuandt(m.regression, { label: by, values: X.data.subarray(at * T, (at + 1) * T) })];
}
