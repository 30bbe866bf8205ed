import { InputError } from "../numeric/index.js";
import {
  autocorrelations,
  centred,
  crossCorrelations,
  type LagCorrelation,
  varianceOfUnrelated,
} from "./look/correlation.js";
import { type Bin, thin } from "./look/thin.js";
import { requireRegular } from "./regular.js";
import { type Remark, Result } from "./result.js";
import type { TimeTable } from "./table.js";
import { countedSteps, seasonLength } from "./time/step.js";
import { periodLabel, spanText, type TimeIndex } from "./time/time-index.js";

/** One series as `look` shows it. */
export interface LookSeries {
  readonly name: string;
  /** The series over the shared time axis, aggregated when it is long. */
  readonly bins: readonly Bin[];
  readonly autocorrelation: readonly LagCorrelation[];
  /** Correlation with the first series, lag by lag; absent for the first. */
  readonly withFirst?: readonly LagCorrelation[];
  /**
   * Half width of the 95% band of the correlations with the first when the two series have nothing to do with each
   * other, each with its own autocorrelation; wider than `band` where both are persistent.
   */
  readonly bandWithFirst?: number;
}

/** What `look` gives. */
export interface LookParts {
  readonly index: TimeIndex;
  readonly series: readonly LookSeries[];
  /** Periods in one bin: 1 unless the series were aggregated for the chart. */
  readonly periodsPerBin: number;
  /** Half width of the 95% band of the autocorrelations of a series without any, 1.96/√T; T the fewest values that a series has. */
  readonly band: number;
  readonly remarks: readonly Remark[];
  readonly fingerprint: string;
}

/** Series over a shared time axis with their autocorrelations and their correlations with the first. */
export class Look extends Result implements LookParts {
  override readonly kind = "look";
  readonly index: TimeIndex;
  readonly series: readonly LookSeries[];
  readonly periodsPerBin: number;
  readonly band: number;
  readonly remarks: readonly Remark[];
  readonly fingerprint: string;

  constructor(parts: LookParts) {
    super();
    this.index = parts.index;
    this.series = parts.series;
    this.periodsPerBin = parts.periodsPerBin;
    this.band = parts.band;
    this.remarks = parts.remarks;
    this.fingerprint = parts.fingerprint;
  }

  override toJSON(): Record<string, unknown> {
    return {
      kind: this.kind,
      span: spanText(this.index),
      periodsPerBin: this.periodsPerBin,
      band: this.band,
      series: this.series.map((one) => ({
        ...one,
        bins: one.bins.map((bin) => ({
          first: periodLabel(this.index, bin.first),
          last: periodLabel(this.index, bin.last),
          low: finite(bin.low),
          mean: finite(bin.mean),
          high: finite(bin.high),
          count: bin.count,
        })),
      })),
      remarks: this.remarks,
      fingerprint: this.fingerprint,
    };
  }
}

const finite = (value: number) => (Number.isFinite(value) ? value : null);
const mostBins = 600;

/**
 * A look at chosen series (default: the first twelve columns of numbers that vary) on one time axis, with their
 * autocorrelations and the correlation of each with the first at lags back and forth, up to two seasons or 40 periods.
 * Missing periods count as the mean. Long series are aggregated for the chart, which is said; correlations always use
 * every period. Throws InputError for a column that is none, holds text or does not vary.
 */
export function look(table: TimeTable, columns?: readonly string[]): Look {
  requireRegular(table.index, "look");
  const { ordinals, step } = table.index;
  const first = ordinals[0]!;
  const span = ordinals[ordinals.length - 1]! - first + 1;
  const lags = mostLags(span, seasonLength(step));
  const { names, remarks } = chosen(table, columns);
  const onAxis = names.map((name) => {
    const values = new Float64Array(span).fill(Number.NaN);
    table.numbers(name).forEach((value, row) => {
      values[ordinals[row]! - first] = value;
    });
    return values;
  });
  const present = onAxis.map((values) => values.reduce((n, value) => n + (Number.isNaN(value) ? 0 : 1), 0));
  const centredSeries = onAxis.map(centred);
  const own = centredSeries.map((values) => autocorrelations(values, lags));
  const series = names.map((name, i): LookSeries => {
    const shared = { name, bins: thin(onAxis[i]!, first, mostBins), autocorrelation: own[i]! };
    if (i === 0) return shared;
    const fewest = Math.min(present[0]!, present[i]!);
    return {
      ...shared,
      withFirst: crossCorrelations(centredSeries[0]!, centredSeries[i]!, lags),
      bandWithFirst: z95 * Math.sqrt(varianceOfUnrelated(own[0]!, own[i]!) / fewest),
    };
  });
  const periodsPerBin = Math.ceil(span / mostBins);
  if (periodsPerBin > 1) {
    remarks.push({
      severity: "note",
      text: `the chart draws the mean and range of every ${countedSteps(periodsPerBin, step)}; correlations use every period`,
    });
  }
  return new Look({
    index: table.index,
    series,
    periodsPerBin,
    band: z95 / Math.sqrt(Math.min(...present)),
    remarks: [...remarks, ...table.findings],
    fingerprint: table.fingerprint,
  });
}

/** The 97.5% point of the normal distribution. */
const z95 = 1.959963984540054;
const mostColumns = 12;

function mostLags(span: number, season: number | undefined): number {
  const wanted = season !== undefined ? Math.min(Math.max(2 * season, 8), 110) : 40;
  return Math.max(1, Math.min(Math.floor(span / 4), wanted));
}

function chosen(
  table: TimeTable,
  columns?: readonly string[],
): { names: readonly string[]; remarks: Remark[] } {
  const still = (name: string) => {
    const present = table.numbers(name).filter((value) => !Number.isNaN(value));
    return present.every((value) => value === present[0]);
  };
  if (columns) {
    if (columns.length === 0) throw new InputError("look: no column is named.");
    const flat = columns.find(still);
    if (flat !== undefined) throw new InputError(`look: ${JSON.stringify(flat)} does not vary.`);
    return { names: [...new Set(columns)], remarks: [] };
  }
  const numeric = table.columns.filter(({ kind }) => kind !== "text").map(({ name }) => name);
  if (numeric.length === 0) throw new InputError("look: the table has no column of numbers.");
  const flat = numeric.filter(still);
  const varying = numeric.filter((name) => !flat.includes(name));
  if (varying.length === 0) throw new InputError("look: no column of numbers varies.");
  const remarks: Remark[] = [];
  const say = (text: string) => remarks.push({ severity: "note", text });
  if (flat.length > 0)
    say(`left out because they do not vary: ${flat.map((name) => JSON.stringify(name)).join(", ")}`);
  if (varying.length > mostColumns) {
    say(
      `the first ${mostColumns} of ${varying.length} columns are shown; name others as in look(table, [...])`,
    );
  }
  return { names: varying.slice(0, mostColumns), remarks };
}
