import { type Remark, Result } from "../../data/index.js";
import { recordable } from "../subject.js";

/** Where a rule puts the bandwidth. */
export interface RuleMark {
  readonly rule: string;
  readonly bandwidth: number;
  /** NaN where the variance is negative. */
  readonly se: number;
}

interface BandwidthPathParts {
  readonly about: Record<string, unknown>;
  readonly outcome: string;
  readonly term: string;
  readonly kernel: string;
  readonly bandwidths: Float64Array;
  readonly se: Float64Array;
  readonly classicalSe: number;
  readonly marks: readonly RuleMark[];
  readonly finding: string;
  readonly remarks: readonly Remark[];
}

/** The standard error of one coefficient against the bandwidth. */
export class BandwidthPath extends Result implements BandwidthPathParts {
  override readonly kind = "bandwidth-path";
  declare readonly about: Record<string, unknown>;
  declare readonly outcome: string;
  declare readonly term: string;
  declare readonly kernel: string;
  /** From 0, where no lag weighs in, to half the sample. */
  declare readonly bandwidths: Float64Array;
  /** NaN where the variance is negative. */
  declare readonly se: Float64Array;
  declare readonly classicalSe: number;
  declare readonly marks: readonly RuleMark[];
  declare readonly finding: string;
  declare readonly remarks: readonly Remark[];

  constructor(parts: BandwidthPathParts) {
    super();
    Object.assign(this, parts);
  }

  override toJSON(): Record<string, unknown> {
    return {
      kind: this.kind,
      ...this.about,
      term: this.term,
      kernel: this.kernel,
      finding: this.finding,
      classicalSe: this.classicalSe,
      bandwidths: Array.from(this.bandwidths),
      se: Array.from(this.se, recordable),
      marks: this.marks.map((mark) => ({ ...mark, se: recordable(mark.se) })),
      remarks: this.remarks,
    };
  }
}
