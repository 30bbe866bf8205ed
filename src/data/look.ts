import { InputError } from "../numeric/index.js";
import { autocorrelations, centred, crossCorrelations, type LagCorrelation } from "./look/correlation.js";
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
}

/** What `look` gives. */
export interface LookParts {
  readonly index: TimeIndex;
  readonly series: readonly LookSeries[];
  /** Periods in one bin: 1 unless the series were aggregated for the chart. */
  readonly periodsPerBin: number;
  /** Half width of the 95% band of a correlation of independent series, 1.96/√T. */
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
 * A look at chosen series (default: all columns of numbers) on one time axis, with their autocorrelations and the
 * correlation of each with the first at lags back and forth, up to two seasons or 40 periods. Missing periods count
 * as the mean. Long series are aggregated for the chart, which is said; correlations always use every period.
 */
export function look(table: TimeTable, columns?: readonly string[]): Look {
  requireRegular(table.index, "look");
  const names = columns ?? table.columns.filter(({ kind }) => kind !== "text").map(({ name }) => name);
  if (names.length === 0) throw new InputError("look: the table has no column of numbers.");
  const { ordinals, step } = table.index;
  const first = ordinals[0]!;
  const span = ordinals[ordinals.length - 1]! - first + 1;
  const season = seasonLength(step);
  const lags = Math.max(
    1,
    Math.min(Math.floor(span / 4), season !== undefined && season > 1 ? Math.min(2 * season, 110) : 40),
  );
  const onAxis = names.map((name) => {
    const values = new Float64Array(span).fill(Number.NaN);
    table.numbers(name).forEach((value, row) => {
      values[ordinals[row]! - first] = value;
    });
    return values;
  });
  const still = onAxis.findIndex((values) => centred(values).every((value) => value === 0));
  if (still >= 0) throw new InputError(`look: "${names[still]}" does not vary.`);
  const centredSeries = onAxis.map(centred);
  const series = names.map((name, i): LookSeries => {
    const withFirst =
      i === 0 ? {} : { withFirst: crossCorrelations(centredSeries[0]!, centredSeries[i]!, lags) };
    return {
      name,
      bins: thin(onAxis[i]!, first, mostBins),
      autocorrelation: autocorrelations(centredSeries[i]!, lags),
      ...withFirst,
    };
  });
  const periodsPerBin = Math.ceil(span / mostBins);
  const remarks: Remark[] = [];
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
    band: 1.959963984540054 / Math.sqrt(span),
    remarks: [...remarks, ...table.findings],
    fingerprint: table.fingerprint,
  });
}
