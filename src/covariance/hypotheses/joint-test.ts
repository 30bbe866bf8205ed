import { type Remark, Result } from "../../data/index.js";
import { recordable } from "../subject.js";

interface JointTestParts {
  readonly about: Record<string, unknown>;
  readonly outcome: string;
  readonly level: number;
  readonly restrictions: readonly string[];
  readonly wald: number;
  readonly statistic: number;
  readonly q: number;
  readonly law: string;
  readonly df: readonly number[];
  readonly p: number;
  readonly error: number | undefined;
  readonly estimator: string;
  readonly finding: string;
  readonly remarks: readonly Remark[];
}

/** A test of several restrictions at once. */
export class JointTest extends Result implements JointTestParts {
  override readonly kind = "joint-test";
  declare readonly about: Record<string, unknown>;
  declare readonly outcome: string;
  declare readonly level: number;
  /** The hypothesis, one line each: `fare = 0`. */
  declare readonly restrictions: readonly string[];
  /** (Rβ̂ − r)'(RVR')⁻¹(Rβ̂ − r). */
  declare readonly wald: number;
  /** wald / q. */
  declare readonly statistic: number;
  /** Number of restrictions. */
  declare readonly q: number;
  declare readonly law: string;
  declare readonly df: readonly number[];
  declare readonly p: number;
  /** Standard error of p where its law is simulated. */
  declare readonly error: number | undefined;
  /** The covariance estimator, its choices spelled out. */
  declare readonly estimator: string;
  declare readonly finding: string;
  declare readonly remarks: readonly Remark[];

  constructor(parts: JointTestParts) {
    super();
    Object.assign(this, parts);
  }

  override toJSON(): Record<string, unknown> {
    return {
      kind: this.kind,
      ...this.about,
      estimator: this.estimator,
      restrictions: this.restrictions,
      wald: this.wald,
      statistic: this.statistic,
      q: this.q,
      law: this.law,
      df: this.df,
      p: recordable(this.p),
      ...(this.error === undefined ? {} : { error: this.error }),
      finding: this.finding,
      remarks: this.remarks,
    };
  }
}
