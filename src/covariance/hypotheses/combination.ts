import { type Remark, Result } from "../../data/index.js";
import { recordable } from "../subject.js";
import type { Weights } from "./restrictions.js";

interface CombinationParts {
  readonly about: Record<string, unknown>;
  readonly outcome: string;
  readonly label: string;
  readonly weights: Weights;
  readonly level: number;
  readonly estimate: number;
  readonly se: number;
  readonly low: number;
  readonly high: number;
  readonly statistic: number;
  readonly p: number;
  readonly law: string;
  readonly estimator: string;
  readonly finding: string;
  readonly remarks: readonly Remark[];
}

/** A linear combination of coefficients with its interval. */
export class Combination extends Result implements CombinationParts {
  override readonly kind = "combination";
  declare readonly about: Record<string, unknown>;
  declare readonly outcome: string;
  /** `fare + fare (t−1)`. */
  declare readonly label: string;
  declare readonly weights: Weights;
  declare readonly level: number;
  declare readonly estimate: number;
  /** NaN, as what follows from it, where the variance is negative. */
  declare readonly se: number;
  declare readonly low: number;
  declare readonly high: number;
  /** estimate / se. */
  declare readonly statistic: number;
  /** Two-sided, against zero. */
  declare readonly p: number;
  declare readonly law: string;
  declare readonly estimator: string;
  declare readonly finding: string;
  declare readonly remarks: readonly Remark[];

  constructor(parts: CombinationParts) {
    super();
    Object.assign(this, parts);
  }

  override toJSON(): Record<string, unknown> {
    const { se, low, high, statistic, p } = this;
    return {
      kind: this.kind,
      ...this.about,
      estimator: this.estimator,
      label: this.label,
      weights: this.weights,
      estimate: this.estimate,
      se: recordable(se),
      low: recordable(low),
      high: recordable(high),
      statistic: recordable(statistic),
      p: recordable(p),
      law: this.law,
      finding: this.finding,
      remarks: this.remarks,
    };
  }
}
