import { parsePeriod } from "../data/index.js";
import { InputError } from "../numeric/index.js";
import { about, Diagnostic, type DiagnosticFields } from "./diagnostic.js";
import { spansConstant, unitResiduals } from "./parts/residuals.js";
import { rowLabel } from "./parts/row-label.js";
import { termAt } from "./parts/term-at.js";
import { figure, listed, pValue } from "./parts/words.js";
import { chow, robustChow } from "./stability/chow.js";
import { type CusumPath, cusum } from "./stability/cusum.js";
import { cusumOfSquares } from "./stability/cusum-squares.js";
import { recursion } from "./stability/recursion.js";
import { type RecursivePath, recursiveCoefficients } from "./stability/recursive-coefficients.js";
import { regimes } from "./stability/regimes.js";
import { stabilityRemarks } from "./stability/remarks.js";
import { residualCusum } from "./stability/residual-cusum.js";
import { severalBreaks } from "./stability/several-breaks.js";
import { supWald } from "./stability/sup-wald.js";
import type { Fitted } from "./subject.js";
import type { Test } from "./test.js";

/** Options of `stability`. */
export interface StabilityOptions {
  /** First period after a break that is known beforehand, as the time column writes it (`2021-W30`): adds Chow's test. */
  readonly at?: string;
  /** Share of the sample kept free at either end when dates are searched; default 0.15, from 0.05 to 0.4. */
  readonly trim?: number;
  /** Terms that may break; default all that vary on both sides of every date. */
  readonly terms?: readonly string[];
  /** Most breaks looked for; default 5. */
  readonly breaks?: number;
  /** Draws of the bootstrap, default 499 (199 beyond 2,000 periods), and of the CUSUM of squares, default 999. */
  readonly draws?: number;
  /** Seed of both; default 1. */
  readonly seed?: number;
}

/** One part of the sample between breaks. */
export interface StabilityRegime {
  readonly from: number;
  readonly to: number;
  readonly label: string;
  /** Per term; NaN where the part does not determine it. */
  readonly coefficients: readonly number[];
}

interface StabilityFields extends DiagnosticFields {
  readonly terms: readonly string[];
  /** Whether the robust search for one break rejects stable coefficients at 1 − level. */
  readonly unstable: boolean;
  readonly decisive: Test | undefined;
  /** The Wald statistic over the dates searched: `at` is the first period after the break. */
  readonly path: readonly { readonly at: number; readonly wald: number }[];
  /** First periods after the breaks found, and their labels. */
  readonly breaks: readonly { readonly at: number; readonly label: string }[];
  /** Numbers of breaks by the tests and by BIC, with residual sum of squares and BIC for each number. */
  readonly numberOfBreaks: {
    readonly byTests: number;
    readonly byBic: number;
    readonly criteria: readonly { readonly breaks: number; readonly rss: number; readonly bic: number }[];
  };
  readonly regimes: readonly StabilityRegime[];
  readonly cusum: CusumPath["path"];
  readonly cusumOfSquares: CusumPath["path"];
  readonly recursive: readonly RecursivePath[];
}

/** Whether the coefficients of a fit are the same throughout. */
export class Stability extends Diagnostic implements StabilityFields {
  override readonly kind = "stability";
  declare readonly terms: readonly string[];
  declare readonly unstable: boolean;
  declare readonly decisive: Test | undefined;
  declare readonly path: StabilityFields["path"];
  declare readonly breaks: StabilityFields["breaks"];
  declare readonly numberOfBreaks: StabilityFields["numberOfBreaks"];
  declare readonly regimes: readonly StabilityRegime[];
  declare readonly cusum: CusumPath["path"];
  declare readonly cusumOfSquares: CusumPath["path"];
  declare readonly recursive: readonly RecursivePath[];

  constructor(fields: StabilityFields) {
    super();
    Object.assign(this, fields);
    Object.freeze(this);
  }
}

/**
 * Tests whether the coefficients of `m` hold throughout: a break at any date (largest Wald statistic with the exact limit law,
 * and by a bootstrap that bears trends, dependence and uneven errors; the finding rests on the latter), several breaks, CUSUM and
 * CUSUM of squares, recursive coefficients, and Chow's test where a date is given. Throws an InputError for a perfect fit, an
 * unknown term, and a date outside the sample.
 */
export function stability(m: Fitted, options: StabilityOptions = {}): Stability {
  const r = m.regression;
  unitResiduals(r, "stability");
  const trim = options.trim ?? 0.15;
  if (!(trim >= 0.05 && trim <= 0.4))
    throw new InputError(`stability: trim = ${trim} must be from 0.05 to 0.4 of the sample.`);
  const seed = options.seed ?? 1;
  const search = {
    trim,
    seed,
    ...(options.draws === undefined ? {} : { draws: options.draws }),
    ...(options.terms ? { candidates: options.terms.map((term) => termAt(r.terms, term, "stability")) } : {}),
  };
  const known = options.at === undefined ? [] : knownBreak(m, options.at);
  const one = supWald(r, search);
  const pass = recursion(r, r.y);
  const sums = cusum(pass, m.level);
  const squares = cusumOfSquares(pass, m.level, seed, options.draws);
  const several = severalBreaks(r, m.level, options.breaks ?? 5, search, one.robust);
  const decisive = [one.robust, one.plain].find((test) => !Number.isNaN(test.p));
  const unstable = decisive !== undefined && decisive.p < 1 - m.level;
  const at = several.partitions[several.byTests]!.breaks;
  const parts = regimes(r, at).map((part) => ({
    from: r.periods[part.from]!,
    to: r.periods[part.to]!,
    label: `${rowLabel(m, part.from)} to ${rowLabel(m, part.to)}`,
    coefficients: part.coefficients,
  }));
  const labelled = (row: number) => ({ at: r.periods[row]!, label: rowLabel(m, row) });
  const breaks = at.map(labelled);
  return new Stability({
    ...about(m),
    seed,
    tests: [
      one.plain,
      one.robust,
      ...known,
      sums.test,
      residualCusum(r, spansConstant(r)),
      squares.test,
      ...several.tests,
    ],
    terms: r.terms,
    unstable,
    decisive,
    path: one.path.map(({ rowsBefore, wald }) => ({ at: r.periods[rowsBefore]!, wald })),
    breaks,
    numberOfBreaks: {
      byTests: several.byTests,
      byBic: several.byBic,
      criteria: several.partitions.map(({ breaks: b, rss, bic }) => ({ breaks: b.length, rss, bic })),
    },
    regimes: parts,
    cusum: sums.path,
    cusumOfSquares: squares.path,
    recursive: recursiveCoefficients(r, m.level),
    finding: finding(m, unstable, decisive, one.rowsBefore, breaks, parts),
    remarks: stabilityRemarks(r, one, several, m.level),
  });
}

function knownBreak(m: Fitted, text: string): Test[] {
  const r = m.regression;
  const at = parsePeriod(m.design.index, text);
  const rowsBefore = r.periods.findIndex((period) => period >= at);
  if (rowsBefore < 1)
    throw new InputError(
      `stability: at = "${text}" must fall after the first period used (${rowLabel(m, 0)}) and not beyond the last (${rowLabel(m, r.T - 1)}).`,
    );
  return [chow(r, rowsBefore), robustChow(r, rowsBefore)].map((test) => ({
    ...test,
    note: [`break at ${rowLabel(m, rowsBefore)}`, test.note].filter(Boolean).join("; "),
  }));
}

function finding(
  m: Fitted,
  unstable: boolean,
  decisive: Test | undefined,
  rowsBefore: number,
  breaks: readonly { readonly label: string }[],
  parts: readonly StabilityRegime[],
): string {
  if (!decisive) return "Too few periods on either side to search for a break in the coefficients.";
  const test = `largest Wald statistic ${figure(decisive.statistic)} at ${rowLabel(m, rowsBefore)}, ${pValue(decisive.p)}`;
  if (!unstable) return `No break found in the coefficients; ${test}.`;
  const r = m.regression;
  const dates = breaks.length > 0 ? listed(breaks.map((b) => b.label)) : rowLabel(m, rowsBefore);
  let most: { term: string; before: number; after: number } | undefined;
  let size = 0;
  for (let j = 0; j < r.k; j++) {
    if (j === r.interceptAt && r.k > 1) continue;
    for (let i = 1; i < parts.length; i++) {
      const before = parts[i - 1]!.coefficients[j]!;
      const after = parts[i]!.coefficients[j]!;
      const move = Math.abs(after - before) / Math.sqrt(r.gramInverse.data[j * r.k + j]!);
      if (move > size) {
        size = move;
        most = { term: r.terms[j]!, before, after };
      }
    }
  }
  const change = most ? `; ${most.term} goes from ${figure(most.before)} to ${figure(most.after)}` : "";
  return `The coefficients change at ${dates}${change} (${test}).`;
}
