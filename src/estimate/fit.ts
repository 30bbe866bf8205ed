import { periodLabel, type Remark, Result, spanText, suggestion, type TimeTable } from "../data/index.js";
import { columnsOf, type Design, type TermLike } from "../design/index.js";
import { InputError } from "../numeric/index.js";
import { type Coefficient, judgedCoefficients, requireLevel } from "./coefficients.js";
import type { Covariance, CovarianceEstimator } from "./covariance-estimator.js";
import { requireEstimator } from "./estimator-required.js";
import type { FitParts, Shared, Specification, Watcher } from "./fit-parts.js";
import { fitRecord } from "./fit-record.js";
import { fitRemarks } from "./fit-remarks.js";
import { Goodness } from "./goodness.js";
import type { LeastSquaresFit } from "./regress.js";

/**
 * A fitted regression of T periods on k terms, under a covariance estimator. Immutable: `under` puts another estimator
 * on and re-estimates nothing. Whatever rests on the estimator is computed when it is first asked for.
 */
export class Fit extends Result {
  override readonly kind = "fit";
  readonly table: TimeTable;
  readonly design: Design;
  readonly regression: LeastSquaresFit;
  readonly estimator: CovarianceEstimator;
  /** Level of the intervals, such as 0.95. */
  readonly level: number;
  readonly #watch: readonly Watcher[];
  readonly #shared: Shared;
  #covariance: Covariance | undefined;
  #coefficients: readonly Coefficient[] | undefined;
  #remarks: readonly Remark[] | undefined;

  constructor(parts: FitParts, like?: Fit) {
    super();
    this.table = parts.table;
    this.design = parts.design;
    this.regression = parts.regression;
    this.estimator = parts.estimator;
    this.level = parts.level;
    this.#watch = parts.watch ?? [];
    this.#shared = like ? like.#shared : { goodness: new Goodness(parts.regression) };
    Object.freeze(this);
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

  /** Labels of the T periods used. */
  get periods(): readonly string[] {
    this.#shared.periods ??= Object.freeze(
      Array.from(this.regression.periods, (ordinal) => periodLabel(this.design.index, ordinal)),
    );
    return this.#shared.periods;
  }

  /** y − Xβ̂ over `periods`, a copy. */
  get residuals(): Float64Array {
    this.#shared.residuals ??= this.regression.residuals.slice();
    return this.#shared.residuals;
  }

  /** Xβ̂ over `periods`. */
  get fitted(): Float64Array {
    const { y, residuals } = this.regression;
    this.#shared.fitted ??= y.map((value, t) => value - residuals[t]!);
    return this.#shared.fitted;
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
    return this.#shared.goodness.rSquared;
  }

  /** Gaussian log-likelihood with σ² at rss / T. */
  get logLikelihood(): number {
    return this.#shared.goodness.logLikelihood;
  }

  /** −2ℓ + 2(k + 1); σ² counts as a parameter. */
  get aic(): number {
    return this.#shared.goodness.aic;
  }

  /** −2ℓ + (k + 1) log T. */
  get bic(): number {
    return this.#shared.goodness.bic;
  }

  /** Whether the residuals are zero to rounding, so that nothing can be said of their spread or dependence. */
  get perfect(): boolean {
    return this.#shared.goodness.perfect;
  }

  /** The coefficients' covariance under the present estimator. Throws InputError for a perfect fit, which has none. */
  get covariance(): Covariance {
    if (this.perfect)
      throw new InputError(
        "the fit is perfect to rounding: its coefficients have no covariance to estimate.",
      );
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

  /**
   * One coefficient by its label, or by the term itself: `m.coefficient("fare (t−1)")`, `m.coefficient(lag("fare"))`. An
   * ordinary hyphen does for the minus sign. Throws InputError, suggesting the nearest.
   */
  coefficient(term: TermLike): Coefficient {
    const label = typeof term === "string" ? term : this.#labelOf(term);
    const signed = label.replace(/\(t-(\d+)\)/g, "(t\u2212$1)");
    const found =
      this.coefficients.find((row) => row.term === label) ??
      this.coefficients.find((row) => row.term === signed);
    if (found) return found;
    throw new InputError(`the fit has no term ${JSON.stringify(label)}.${suggestion(label, this.terms)}`);
  }

  /** The same fit under another covariance estimator. */
  under(estimator: CovarianceEstimator): Fit {
    requireEstimator("under", estimator);
    return new Fit({ ...this.#parts(), estimator }, this);
  }

  /** The same fit with intervals of another level, such as 0.9. Throws InputError for what is no level. */
  at(level: number): Fit {
    requireLevel(level);
    return new Fit({ ...this.#parts(), level }, this);
  }

  get specification(): Specification {
    const { terms, interceptAt, periods } = this.regression;
    const name = (ordinal: number) => periodLabel(this.design.index, ordinal);
    return {
      outcome: this.outcome,
      terms: terms.filter((_, j) => j !== interceptAt),
      intercept: interceptAt >= 0,
      sample: [name(periods[0]!), name(periods[periods.length - 1]!)],
      errors: "iid",
    };
  }

  /** Fingerprint of the data that were fitted. */
  get fingerprint(): string {
    return this.table.fingerprint;
  }

  /** What the reader of the card must know, of the design, the arithmetic, the estimator and the errors. */
  get remarks(): readonly Remark[] {
    this.#remarks ??= Object.freeze([...fitRemarks(this), ...this.#watched()]);
    return this.#remarks;
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

  #watched(): readonly Remark[] {
    if (this.perfect) return [];
    this.#shared.watched ??= this.#watch.flatMap((look) => look(this.regression) ?? []);
    return this.#shared.watched;
  }

  #labelOf(term: TermLike): string {
    const labels = columnsOf(term, this.table).map(({ label }) => label);
    if (labels.length === 1) return labels[0]!;
    throw new InputError(`coefficient: ${labels.join(", ")} are ${labels.length} terms; name one of them.`);
  }
}
