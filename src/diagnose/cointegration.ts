import { periodLabel, type Remark, Result } from "../data/index.js";
import { InputError, RankDeficient } from "../numeric/index.js";
import { autocorrelations } from "./dependence/correlogram.js";
import { deterministicColumns } from "./integration/deterministic.js";
import { dickeyFuller, type LagRule } from "./integration/dickey-fuller.js";
import { engleGranger } from "./integration/engle-granger.js";
import { type SeriesSource, unbroken } from "./integration/series.js";
import { mostSeries, unitRootCritical } from "./integration/unit-root-law.js";
import { auxiliaryRegression } from "./parts/auxiliary-regression.js";
import { record } from "./parts/record.js";
import { isPerfectFit } from "./parts/residuals.js";
import { counted, figure, listed, pValue } from "./parts/words.js";
import type { Test } from "./test.js";

/** Options of `cointegration`. */
export interface CointegrationOptions {
  /** Whether a linear trend stands beside the constant in the relation; default false. */
  readonly trend?: boolean;
  /** Lagged differences in the test of the residuals: a number, or found by "bic" (default), "aic" or "t". */
  readonly lags?: LagRule;
  /** Confidence level of the finding; default 0.95. */
  readonly level?: number;
}

interface CointegrationFields {
  readonly columns: readonly string[];
  readonly T: number;
  readonly level: number;
  readonly tests: readonly Test[];
  /** Whether the unit root of the residuals is rejected at 1 − level. */
  readonly cointegrated: boolean;
  /** The relation of the first column to the others. Standard errors of levels regressions say nothing and are not given. */
  readonly relation: readonly { readonly term: string; readonly estimate: number }[];
  /** Critical values at 1, 5 and 10 %. */
  readonly critical: readonly [number, number, number];
  /** How far the first column is from the relation, thinned to 600 points, and the autocorrelations of that. */
  readonly residuals: readonly { readonly at: number; readonly label: string; readonly value: number }[];
  readonly acf: readonly number[];
  readonly finding: string;
  readonly remarks: readonly Remark[];
}

/** Whether integrated series keep to a relation among themselves. */
export class Cointegration extends Result implements CointegrationFields {
  override readonly kind = "cointegration";
  declare readonly columns: readonly string[];
  declare readonly T: number;
  declare readonly level: number;
  declare readonly tests: readonly Test[];
  declare readonly cointegrated: boolean;
  declare readonly relation: CointegrationFields["relation"];
  declare readonly critical: readonly [number, number, number];
  declare readonly residuals: CointegrationFields["residuals"];
  declare readonly acf: readonly number[];
  declare readonly finding: string;
  declare readonly remarks: readonly Remark[];

  constructor(fields: CointegrationFields) {
    super();
    Object.assign(this, fields);
    Object.freeze(this);
  }

  override toJSON(): Record<string, unknown> {
    return record({ ...this }) as Record<string, unknown>;
  }
}

/**
 * Engle and Granger (1987): the first column regressed on the others, and its residuals tested for a unit root with MacKinnon's
 * surfaces for that many series. Two to six columns; gaps, constant columns and exact relations are refused.
 */
export function cointegration(
  table: SeriesSource,
  columns: readonly string[],
  options: CointegrationOptions = {},
): Cointegration {
  if (columns.length < 2 || columns.length > mostSeries)
    throw new InputError(
      `cointegration: ${counted(columns.length, "column")} given; the test is for two to ${mostSeries}, the first explained by the others.`,
    );
  const kind = options.trend ? "trend" : "constant";
  const level = options.level ?? 0.95;
  const { values, ordinals, trimmed } = unbroken(table, columns, "cointegration");
  const [y, ...others] = values as [Float64Array, ...Float64Array[]];
  const what = `cointegration: ${columns.map((c) => `"${c}"`).join(", ")}`;
  const T = y.length;
  const deterministic = deterministicColumns(kind, T);
  const labels = [...["intercept", "trend"].slice(0, deterministic.length), ...columns.slice(1)];
  const relation = regressed(y, [...deterministic, ...others], labels, ordinals, what);
  const found = dickeyFuller(relation.residuals, "none", options.lags ?? "bic", what);
  const test = engleGranger(found.tau, found.n, found.lags, kind, columns.length);
  const cointegrated = test.p < 1 - level;
  const every = Math.max(1, Math.ceil(T / 600));
  const terms = columns.slice(1).map((name, i) => {
    const b = relation.coefficients[deterministic.length + i]!;
    return `${figure(b)} per unit of ${name}`;
  });
  return new Cointegration({
    columns,
    T,
    level,
    tests: [test],
    cointegrated,
    relation: labels.map((term, j) => ({ term, estimate: relation.coefficients[j]! })),
    critical: [1, 5, 10].map((p) =>
      unitRootCritical(p as 1 | 5 | 10, found.n, kind, columns.length),
    ) as unknown as [number, number, number],
    residuals: [...relation.residuals.keys()]
      .filter((t) => t % every === 0 || t === T - 1)
      .map((t) => ({
        at: ordinals[t]!,
        label: periodLabel(table.index, ordinals[t]!),
        value: relation.residuals[t]!,
      })),
    acf: Array.from(autocorrelations(relation.residuals, ordinals, Math.min(T - 1, 24)).r),
    finding: cointegrated
      ? `${columns[0]} keeps to a relation with ${listed(columns.slice(1))} (${listed(terms)}): Engle–Granger ${figure(test.statistic)}, ${pValue(test.p)}.`
      : `No lasting relation of ${columns[0]} with ${listed(columns.slice(1))} found: Engle–Granger ${figure(test.statistic)}, ${pValue(test.p)}; a regression in levels may be spurious.`,
    remarks:
      trimmed === 0
        ? []
        : [
            {
              severity: "note",
              text: `${counted(trimmed, "period")} at the ends with a column missing left off.`,
            },
          ],
  });
}

function regressed(
  y: Float64Array,
  columns: readonly Float64Array[],
  labels: readonly string[],
  ordinals: Float64Array,
  what: string,
) {
  if (y.length <= columns.length + 1)
    throw new InputError(`${what}: ${y.length} periods are too few for ${columns.length} coefficients.`);
  try {
    const relation = auxiliaryRegression(y, columns, labels, ordinals, { interceptAt: 0 });
    if (isPerfectFit(relation))
      throw new InputError(
        `${what}: the first column is an exact combination of the others, so there is nothing to test.`,
      );
    return relation;
  } catch (problem) {
    if (problem instanceof RankDeficient)
      throw new InputError(
        `${what}: ${listed(problem.dependent.map((j) => labels[j] ?? String(j)))} is an exact combination of the other explaining columns; leave it out.`,
      );
    throw problem;
  }
}
