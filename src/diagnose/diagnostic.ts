import { type Remark, Result, type TimeIndex } from "../data/index.js";
import { record } from "./parts/record.js";
import type { Fitted } from "./subject.js";
import type { Test } from "./test.js";

/** What every diagnostic result says of the fit it is about, of its tests and of what they come to. */
export interface DiagnosticFields {
  readonly outcome: string;
  readonly T: number;
  readonly k: number;
  /** Confidence level of bands and verdicts. */
  readonly level: number;
  readonly tests: readonly Test[];
  /** A sentence about these data. */
  readonly finding: string;
  readonly remarks: readonly Remark[];
  readonly specification?: unknown;
  readonly fingerprint?: string;
  /** The periods used, as cards write them. */
  readonly span?: string;
  /** Seed of what was simulated, where something was. */
  readonly seed?: number;
  /** Where the rows stand on the time axis, for charts over time; not part of the record. */
  readonly time?: RowTimes;
}

/** Where the rows of a regression stand in time. */
export interface RowTimes {
  readonly index: Omit<TimeIndex, "ordinals">;
  /** Per row, in whole steps. */
  readonly periods: Float64Array;
}

/** Base of the diagnostic results: immutable, with the fields above and those of its kind. */
export abstract class Diagnostic extends Result implements DiagnosticFields {
  declare readonly outcome: string;
  declare readonly T: number;
  declare readonly k: number;
  declare readonly level: number;
  declare readonly tests: readonly Test[];
  declare readonly finding: string;
  declare readonly remarks: readonly Remark[];
  declare readonly specification?: unknown;
  declare readonly fingerprint?: string;
  declare readonly span?: string;
  declare readonly seed?: number;
  declare readonly time?: RowTimes;

  /** The tests of one name, such as `Ljung–Box`. */
  named(name: string): readonly Test[] {
    return this.tests.filter((test) => test.name === name);
  }

  override toJSON(): Record<string, unknown> {
    const { time, ...shown } = this;
    return record(shown) as Record<string, unknown>;
  }
}

/** The fields that come straight from the fit. */
export function about(
  m: Fitted,
): Pick<DiagnosticFields, "outcome" | "T" | "k" | "level"> & Partial<DiagnosticFields> {
  return {
    outcome: m.outcome,
    T: m.regression.T,
    k: m.regression.k,
    level: m.level,
    time: { index: m.design.index, periods: m.regression.periods },
    ...(m.span === undefined ? {} : { span: m.span }),
    ...(m.specification === undefined ? {} : { specification: m.specification }),
    ...(m.fingerprint === undefined ? {} : { fingerprint: m.fingerprint }),
  };
}
