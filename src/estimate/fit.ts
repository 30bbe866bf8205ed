import { periodLabel, type Remark, Result, spanText, suggestion, type TimeTable } from "../data/index.js";
import type { Design } from "../design/index.js";
import { InputError, norm } from "../numeric/index.js";
import { type Coefficient, judgedCoefficients, requireLevel } from "./coefficients.js";
import type { Covariance, CovarianceEstimator } from "./covariance-estimator.js";
import { fitRecord } from "./fit-record.js";
import type { LeastSquaresFit } from "./regress.js";

/** What a fit was asked to be, as JSON. */
export interface Specification {
  readonly outcome: string;
  readonly terms: readonly string[];
  readonly intercept: boolean;
  readonly sample: readonly [string, string];
  readonly errors: string;
}

/** Everything a fit is made of. */
export interface FitParts {
  readonly table: TimeTable;
  readonly design: Design;
  readonly regression: LeastSquaresFit;
  readonly estimator: CovarianceEstimator;
  readonly level: number;
  /** Rooms above this one may have something to remark on a regression; asked when the remarks are first read. */
  readonly watch?: readonly ((regression: LeastSquaresFit) => Remark | undefined)[];
}

/**
 * A fitted regression under a covariance estimator. Immutable: `under` puts another estimator on and re-estimates
 * nothing.
 */
export class Fit extends Result {
  override readonly kind = "fit";
  readonly table: TimeTable;
  readonly design: Design;
  readonly regression: LeastSquaresFit;
  readonly estimator: CovarianceEstimator;
  /** Level of the intervals, such as 0.95. */
  readonly level: number;
  readonly #watch: NonNullable<FitParts["watch"]>;
  #watched: readonly Remark[] | undefined;
  #covariance: Covariance | undefined;
  #coefficients: readonly Coefficient[] | undefined;

  constructor(parts: FitParts) {
    super();
    this.table = parts.table;
    this.design = parts.design;
    this.regression = parts.regression;
    this.estimator = parts.estimator;
    this.level = parts.level;
    this.#watch = parts.watch ?? [];
  }

  get outcome(): string {
    return this.design.outcome;
  }

  /** Number of periods used. */
  get T(): number {
    return this.regression.T;
  }

  /** Number of coefficients, the intercept included. */
  get k(): number {
    return this.regression.k;
  }

  /** Labels of the coefficients. */
  get terms(): readonly string[] {
    return this.regression.terms;
  }

  /** Labels of the periods used. */
  get periods(): string[] {
    return Array.from(this.regression.periods, (ordinal) => periodLabel(this.design.index, ordinal));
  }

  /** y − Xβ̂ over `periods`. */
  get residuals(): Float64Array {
    return this.regression.residuals;
  }

  /** Xβ̂ over `periods`. */
  get fitted(): Float64Array {
    return this.regression.y.map((value, t) => value - this.regression.residuals[t]!);
  }

  /** Residual sum of squares. */
  get rss(): number {
    return this.regression.rss;
  }

  /** Residual variance, rss / (T − k). */
  get s2(): number {
    return this.rss / (this.T - this.k);
  }

  /** Share of the outcome's variation explained: about its mean with a constant among the columns, about zero without. */
  get rSquared(): { readonly value: number; readonly about: "mean" | "zero" } {
    const { y } = this.regression;
    const about = this.#hasConstant() ? "mean" : "zero";
    const centre = about === "mean" ? y.reduce((sum, value) => sum + value, 0) / this.T : 0;
    const total = y.reduce((sum, value) => sum + (value - centre) ** 2, 0);
    return { value: 1 - this.rss / total, about };
  }

  /** Gaussian log-likelihood with σ² at rss / T. */
  get logLikelihood(): number {
    return (-this.T / 2) * (Math.log(2 * Math.PI) + Math.log(this.rss / this.T) + 1);
  }

  /** −2ℓ + 2(k + 1); σ² counts as a parameter. */
  get aic(): number {
    return -2 * this.logLikelihood + 2 * (this.k + 1);
  }

  /** −2ℓ + (k + 1) log T. */
  get bic(): number {
    return -2 * this.logLikelihood + (this.k + 1) * Math.log(this.T);
  }

  /** Whether the residuals are zero to rounding, so that nothing can be said of their spread or dependence. */
  get perfect(): boolean {
    const { residuals, y, T } = this.regression;
    return norm(residuals) <= T * Number.EPSILON * norm(y);
  }

  /** The coefficients' covariance under the present estimator. */
  get covariance(): Covariance {
    this.#covariance ??= this.estimator.on(this.regression);
    return this.#covariance;
  }

  /** All coefficients, in the order of `terms`. */
  get coefficients(): readonly Coefficient[] {
    this.#coefficients ??= judgedCoefficients(
      this.regression,
      this.perfect ? undefined : this.covariance,
      this.level,
    );
    return this.#coefficients;
  }

  /** One coefficient by its term's label. Throws InputError, suggesting the nearest. */
  coefficient(term: string): Coefficient {
    const found = this.coefficients.find((row) => row.term === term);
    if (found) return found;
    throw new InputError(`the fit has no term ${JSON.stringify(term)}.${suggestion(term, this.terms)}`);
  }

  /** The same fit under another covariance estimator. */
  under(estimator: CovarianceEstimator): Fit {
    return new Fit({ ...this.#parts(), estimator });
  }

  /** The same fit with intervals of another level, such as 0.9. */
  at(level: number): Fit {
    requireLevel(level);
    return new Fit({ ...this.#parts(), level });
  }

  get specification(): Specification {
    const { terms, interceptAt } = this.regression;
    const periods = this.regression.periods;
    return {
      outcome: this.outcome,
      terms: terms.filter((_, j) => j !== interceptAt),
      intercept: interceptAt >= 0,
      sample: [
        periodLabel(this.design.index, periods[0]!),
        periodLabel(this.design.index, periods[periods.length - 1]!),
      ],
      errors: "iid",
    };
  }

  /** Fingerprint of the data that were fitted. */
  get fingerprint(): string {
    return this.table.fingerprint;
  }

  /** What the reader of the card must know, of the design, the arithmetic and the estimator. */
  get remarks(): readonly Remark[] {
    const remarks: Remark[] = [...this.design.remarks];
    if (this.perfect) {
      remarks.push({
        severity: "caution",
        text: "the fit is perfect to rounding: standard errors, intervals and tests of the residuals mean nothing",
      });
    } else {
      this.#watched ??= this.#watch.flatMap((look) => look(this.regression) ?? []);
      remarks.push(...this.covariance.remarks, ...this.#watched);
    }
    if (this.regression.condition > 1e7) {
      remarks.push({
        severity: "caution",
        text: `the terms nearly depend on one another (condition number ${this.regression.condition.toExponential(1)})`,
      });
    }
    return remarks;
  }

  /** Span of the periods used, as cards write it. */
  get span(): string {
    return spanText({ ...this.design.index, ordinals: this.regression.periods });
  }

  override toJSON(): Record<string, unknown> {
    return fitRecord(this);
  }

  #parts(): FitParts {
    const { table, design, regression, estimator, level } = this;
    return { table, design, regression, estimator, level, watch: this.#watch };
  }

  #hasConstant(): boolean {
    if (this.regression.interceptAt >= 0) return true;
    // A full set of levels spans the constant too: ‖1 − QQ'1‖ is then zero.
    const { Q, T, k } = this.regression;
    let projected = 0;
    for (let j = 0; j < k; j++) {
      let sum = 0;
      for (let t = 0; t < T; t++) sum += Q.data[j * T + t]!;
      projected += sum * sum;
    }
    return Math.abs(T - projected) < 1e-12 * T;
  }
}
