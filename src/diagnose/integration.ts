import { type Remark, Result } from "../data/index.js";
import { InputError } from "../numeric/index.js";
import type { Deterministic } from "./integration/deterministic.js";
import { type DickeyFuller, dickeyFuller, type LagRule } from "./integration/dickey-fuller.js";
import { kpss } from "./integration/kpss.js";
import { phillipsPerron } from "./integration/phillips-perron.js";
import { jointReading, type Reading } from "./integration/reading.js";
import { type SeriesSource, unbroken } from "./integration/series.js";
import { unitRootCritical } from "./integration/unit-root-law.js";
import { record } from "./parts/record.js";
import { counted, listed, pValue } from "./parts/words.js";
import type { Test } from "./test.js";

/** Options of `integration`. */
export interface IntegrationOptions {
  /** Lagged differences in ADF: a number, or found by "bic" (default), "aic" or "t" (from the top). */
  readonly lags?: LagRule;
  /** Bartlett lags of Phillips–Perron and KPSS; default ⌊4(T/100)^¼⌋. */
  readonly bandwidth?: number;
  /** Confidence level of the reading; default 0.95. */
  readonly level?: number;
}

/** What the tests say of one series. */
export interface SeriesIntegration {
  readonly column: string;
  readonly T: number;
  readonly reading: Reading;
  readonly tests: readonly Test[];
  /** ADF about a constant and about a trend: critical values at 1, 5 and 10 % for the periods used. */
  readonly critical: Readonly<Record<"constant" | "trend", readonly [number, number, number]>>;
}

interface IntegrationFields {
  readonly level: number;
  readonly series: readonly SeriesIntegration[];
  readonly tests: readonly Test[];
  readonly finding: string;
  readonly remarks: readonly Remark[];
}

/** Whether series have a unit root. */
export class Integration extends Result implements IntegrationFields {
  override readonly kind = "integration";
  declare readonly level: number;
  declare readonly series: readonly SeriesIntegration[];
  /** All tests, each with its column in the note. */
  declare readonly tests: readonly Test[];
  declare readonly finding: string;
  declare readonly remarks: readonly Remark[];

  constructor(fields: IntegrationFields) {
    super();
    Object.assign(this, fields);
    Object.freeze(this);
  }

  override toJSON(): Record<string, unknown> {
    return record({ ...this }) as Record<string, unknown>;
  }
}

/**
 * Unit-root tests (ADF, Phillips–Perron) and KPSS of one or several columns, about a level and about a trend, and what they come
 * to together. Periods at the ends in which a column is missing are left off and said; a gap in between is refused, as are a
 * constant column and too few periods for the lags.
 */
export function integration(
  table: SeriesSource,
  columns: string | readonly string[],
  options: IntegrationOptions = {},
): Integration {
  const names = typeof columns === "string" ? [columns] : columns;
  if (names.length === 0)
    throw new InputError(
      'integration: no column named; say which, as in integration(weeks, ["fare", "riders"]).',
    );
  const level = options.level ?? 0.95;
  const remarks: Remark[] = [];
  const series = names.map((name) => {
    const { values, trimmed } = unbroken(table, [name], "integration");
    if (trimmed > 0)
      remarks.push({
        severity: "note",
        text: `${counted(trimmed, "period")} at the ends without ${name} left off.`,
      });
    return examine(name, values[0]!, options, 1 - level);
  });
  return new Integration({
    level,
    series,
    tests: series.flatMap((one) =>
      one.tests.map((test) => ({ ...test, note: [one.column, test.note].filter(Boolean).join("; ") })),
    ),
    finding: finding(series),
    remarks,
  });
}

function examine(
  column: string,
  y: Float64Array,
  options: IntegrationOptions,
  alpha: number,
): SeriesIntegration {
  const what = `integration: "${column}"`;
  const rule = options.lags ?? "bic";
  const adf = (kind: Deterministic) => dickeyFuller(y, kind, rule, what);
  const level = adf("constant");
  const trend = adf("trend");
  const kpssLevel = kpss(y, "constant", options.bandwidth, what);
  const kpssTrend = kpss(y, "trend", options.bandwidth, what);
  const difference = Float64Array.from({ length: y.length - 1 }, (_, t) => y[t + 1]! - y[t]!);
  const differences = dickeyFuller(difference, "constant", rule, `${what} in differences`).test;
  const reading = jointReading(
    {
      level: { adf: level.test, kpss: kpssLevel },
      trend: { adf: trend.test, kpss: kpssTrend },
      differences,
    },
    alpha,
  );
  return {
    column,
    T: y.length,
    reading,
    tests: [
      level.test,
      trend.test,
      phillipsPerron(y, "constant", options.bandwidth, what),
      phillipsPerron(y, "trend", options.bandwidth, what),
      kpssLevel,
      kpssTrend,
      { ...differences, name: "ADF, first differences" },
    ],
    critical: { constant: points(level, "constant"), trend: points(trend, "trend") },
  };
}

function points(found: DickeyFuller, kind: Deterministic): [number, number, number] {
  const at = (percent: 1 | 5 | 10) => unitRootCritical(percent, found.n, kind);
  return [at(1), at(5), at(10)];
}

function finding(series: readonly SeriesIntegration[]): string {
  if (series.length === 1) {
    const [one] = series;
    const find = (name: string, law: string) =>
      one!.tests.find((t) => t.name === name && t.distribution.includes(law))!;
    return (
      `${one!.column} reads as ${one!.reading}: ADF ${pValue(find("ADF", "constant").p)} about a level and ` +
      `${pValue(find("ADF", "trend").p)} about a trend, KPSS ${pValue(find("KPSS", "level").p)} and ${pValue(find("KPSS", "trend").p)}.`
    );
  }
  const groups = new Map<Reading, string[]>();
  for (const one of series) groups.set(one.reading, [...(groups.get(one.reading) ?? []), one.column]);
  const text = [...groups]
    .map(([reading, names]) => `${listed(names)} ${names.length === 1 ? "reads" : "read"} as ${reading}`)
    .join("; ");
  return `${text}.`;
}
