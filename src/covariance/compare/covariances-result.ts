import { type Remark, Result, suggestion } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { recordable } from "../subject.js";
import type { ComparedCoefficient, ComparedEstimator } from "./comparison.js";

interface CovariancesParts {
  readonly about: Record<string, unknown>;
  readonly outcome: string;
  readonly span: string | undefined;
  readonly T: number;
  readonly k: number;
  readonly level: number;
  readonly estimators: readonly ComparedEstimator[];
  readonly coefficients: readonly ComparedCoefficient[];
  readonly finding: string;
  readonly remarks: readonly Remark[];
}

/** What each covariance estimator does to every conclusion of one fit. */
export class Covariances extends Result implements CovariancesParts {
  override readonly kind = "covariances";
  declare readonly about: Record<string, unknown>;
  declare readonly outcome: string;
  declare readonly span: string | undefined;
  declare readonly T: number;
  declare readonly k: number;
  /** Level of the intervals. */
  declare readonly level: number;
  declare readonly estimators: readonly ComparedEstimator[];
  /** The chosen coefficients, in the chosen order; each has one interval per estimator. */
  declare readonly coefficients: readonly ComparedCoefficient[];
  declare readonly finding: string;
  /** Cautions and notes of the estimators, each once, with whom it concerns. */
  declare readonly remarks: readonly Remark[];

  constructor(parts: CovariancesParts) {
    super();
    Object.assign(this, parts);
  }

  /** One coefficient by its label. Throws InputError, suggesting the nearest. */
  coefficient(term: string): ComparedCoefficient {
    const found = this.coefficients.find((row) => row.term === term);
    if (found) return found;
    const terms = this.coefficients.map((row) => row.term);
    throw new InputError(
      `covariances: there is no coefficient ${JSON.stringify(term)}.${suggestion(term, terms)}`,
    );
  }

  override toJSON(): Record<string, unknown> {
    return {
      kind: this.kind,
      ...this.about,
      level: this.level,
      finding: this.finding,
      estimators: this.estimators.map(({ name, label, kind, options, details, refused }) => ({
        name,
        label,
        kind,
        options,
        details,
        ...(refused === undefined ? {} : { refused }),
      })),
      coefficients: this.coefficients.map((row) => ({
        term: row.term,
        estimate: row.estimate,
        classicalSe: row.classicalSe,
        apart: row.apart,
        judged: row.judged,
        holds: row.holds,
        sensitivity: recordable(row.sensitivity),
        intervals: row.intervals.map((interval) => ({
          estimator: interval.estimator,
          se: recordable(interval.se),
          low: recordable(interval.low),
          high: recordable(interval.high),
          p: recordable(interval.p),
          ratio: recordable(interval.ratio),
          widthRatio: recordable(interval.widthRatio),
          law: interval.law,
          conclusion: interval.conclusion,
        })),
      })),
      remarks: this.remarks,
    };
  }
}
