import { seasonLength } from "../data/index.js";
import { InputError, studentT } from "../numeric/index.js";
import { about, Diagnostic, type DiagnosticFields } from "./diagnostic.js";
import { type BlockInfluence, blockInfluence } from "./leverage/blocks.js";
import { type Collinearity, collinearity } from "./leverage/collinearity.js";
import { exact, type PeriodInfluence, periodInfluence } from "./leverage/periods.js";
import { notComputed } from "./parts/laws.js";
import { unitResiduals } from "./parts/residuals.js";
import { rowLabel } from "./parts/row-label.js";
import { counted, figure, listed } from "./parts/words.js";
import type { Fitted } from "./subject.js";
import type { Test } from "./test.js";

/** Options of `leverage`. */
export interface LeverageOptions {
  /** Rows left out together; default one season where one is known and an eighth of the sample holds it, else T^(1/3). */
  readonly block?: number;
}

/** A block of neighbouring periods, and how far leaving it out moves each coefficient. */
export interface Block {
  /** First and last period left out, on the time axis and as labels. */
  readonly from: number;
  readonly to: number;
  readonly label: string;
  readonly coefficients: readonly number[];
  /** (Coefficient without the block − coefficient) / standard error, per term. */
  readonly moves: readonly number[];
}

interface LeverageFields extends DiagnosticFields {
  readonly terms: readonly string[];
  /** Periods in time order: all up to 500, the 500 with the largest Cook's distance or leverage beyond. */
  readonly periods: readonly PeriodInfluence[];
  readonly blockLength: number;
  readonly blocks: readonly Block[];
  readonly collinearity: Collinearity;
}

/** Which periods and which terms a fit hangs on. */
export class Leverage extends Diagnostic implements LeverageFields {
  override readonly kind = "leverage";
  declare readonly terms: readonly string[];
  declare readonly periods: readonly PeriodInfluence[];
  declare readonly blockLength: number;
  declare readonly blocks: readonly Block[];
  declare readonly collinearity: Collinearity;

  constructor(fields: LeverageFields) {
    super();
    Object.assign(this, fields);
    Object.freeze(this);
  }
}

/**
 * What single periods, runs of neighbouring periods and near-dependencies among the terms do to the fit `m`. Moves of
 * coefficients are in standard errors under the covariance estimator that is on. Throws an InputError for a perfect fit and
 * for a block longer than half the sample.
 */
export function leverage(m: Fitted, options: LeverageOptions = {}): Leverage {
  const r = m.regression;
  unitResiduals(r, "leverage");
  const season = seasonLength(m.design.index.step);
  const fallback = season && season * 8 <= r.T ? season : Math.max(2, Math.round(Math.cbrt(r.T)));
  const length = options.block ?? Math.min(fallback, Math.max(1, Math.floor(r.T / 2)));
  if (!Number.isInteger(length) || length < 1 || length > r.T / 2)
    throw new InputError(
      `leverage: block = ${length} must be a whole number from 1 to ${Math.floor(r.T / 2)} (half of ${r.T} periods).`,
    );
  const errors = standardErrors(m);
  const periods = periodInfluence(r);
  const label = (row: number) => rowLabel(m, row);
  const stride = Math.max(1, Math.floor(r.T / 400));
  const blocks = blockInfluence(r, length, stride).map((block) => described(block, r, errors, label));
  const outlier = largestResidual(periods, r.T, r.k, label);
  const fixed = periods.filter((p) => p.leverage > exact);
  return new Leverage({
    ...about(m),
    tests: [outlier],
    terms: r.terms,
    periods: thinned(periods),
    blockLength: length,
    blocks,
    collinearity: collinearity(r),
    finding: finding(r.terms, r.interceptAt, r.coefficients, blocks, outlier),
    remarks:
      fixed.length === 0
        ? []
        : [
            {
              severity: "caution",
              text: `${counted(fixed.length, "period is", "periods are")} fitted exactly by a term of their own (${listed(fixed.slice(0, 3).map((p) => label(p.row)))}${fixed.length > 3 ? ", ..." : ""}): they tell nothing about the other terms.`,
            },
          ],
  });
}

function standardErrors(m: Fitted): number[] {
  const r = m.regression;
  const s2 = r.rss / (r.T - r.k);
  return r.terms.map(
    (term, j) =>
      m.coefficients?.find((c) => c.term === term)?.se ?? Math.sqrt(s2 * r.gramInverse.data[j * r.k + j]!),
  );
}

function described(
  block: BlockInfluence,
  r: Fitted["regression"],
  errors: readonly number[],
  label: (row: number) => string,
): Block {
  return {
    from: r.periods[block.from]!,
    to: r.periods[block.to]!,
    label: block.from === block.to ? label(block.from) : `${label(block.from)} to ${label(block.to)}`,
    coefficients: block.coefficients,
    moves: block.coefficients.map((b, j) => (b - r.coefficients[j]!) / errors[j]!),
  };
}

/** Largest externally studentised residual against t(T−k−1), times T (Bonferroni). */
function largestResidual(
  periods: readonly PeriodInfluence[],
  T: number,
  k: number,
  label: (row: number) => string,
): Test {
  const name = "Largest studentised residual";
  const known = periods.filter((p) => !Number.isNaN(p.studentised));
  const df = T - k - 1;
  if (known.length === 0 || df < 1) return notComputed(name, `T − k = ${T - k} is too few`);
  const most = known.reduce((a, b) => (Math.abs(b.studentised) > Math.abs(a.studentised) ? b : a));
  const p = Math.min(1, known.length * 2 * studentT.upper(Math.abs(most.studentised), df));
  return {
    name,
    statistic: most.studentised,
    df: [df],
    distribution: `t(${df}), the largest of ${known.length}`,
    p,
    valid: true,
    note: label(most.row),
  };
}

function thinned(periods: readonly PeriodInfluence[], most = 500): PeriodInfluence[] {
  if (periods.length <= most) return [...periods];
  const rank = (p: PeriodInfluence) => (Number.isNaN(p.cook) ? Number.POSITIVE_INFINITY : p.cook);
  const byCook = [...periods].sort((a, b) => rank(b) - rank(a) || a.row - b.row).slice(0, most / 2);
  const kept = new Set(byCook);
  for (const p of [...periods].sort((a, b) => b.leverage - a.leverage || a.row - b.row)) {
    if (kept.size >= most) break;
    kept.add(p);
  }
  return [...kept].sort((a, b) => a.row - b.row);
}

function finding(
  terms: readonly string[],
  interceptAt: number,
  coefficients: Float64Array,
  blocks: readonly Block[],
  outlier: Test,
): string {
  const others = terms.length > 1 ? terms.map((_, j) => j).filter((j) => j !== interceptAt) : [0];
  let far: { block: Block; j: number } | undefined;
  for (const block of blocks)
    for (const j of others)
      if (Math.abs(block.moves[j]!) > Math.abs(far?.block.moves[far.j] ?? 0)) far = { block, j };
  const lead = far
    ? `Leaving out ${far.block.label} moves ${terms[far.j]} the furthest, by ${figure(far.block.moves[far.j]!, 2)} standard errors, from ${figure(coefficients[far.j]!)} to ${figure(far.block.coefficients[far.j]!)}`
    : "No block of periods can be left out";
  const single = Number.isNaN(outlier.p)
    ? ""
    : `; the largest single residual is ${outlier.note} at ${figure(outlier.statistic, 2)} standard deviations`;
  return `${lead}${single}.`;
}
