import type { JointLaw } from "../../estimate/index.js";
import { chiSquared } from "../../numeric/index.js";
import { criticalValue } from "./craig.js";

/** A joint law that is an average over draws, with the standard error of that average. */
export interface SimulatedJointLaw extends JointLaw {
  /** Standard error of `upper` at 5 %. */
  readonly error: number;
  /** Standard error of `upper` at this value. */
  standardError(wald: number): number;
}

/**
 * The law of W = R/D for R ~ χ²_q and independent D > 0, of which there are draws: the mean of P(χ²_q > W D). Only D
 * is drawn, so the average is far more exact than a count of draws beyond W would be.
 */
export function mixtureLaw(name: string, q: number, draws: () => Float64Array): SimulatedJointLaw {
  const moments = (wald: number): { mean: number; error: number } => {
    if (Number.isNaN(wald)) return { mean: Number.NaN, error: Number.NaN };
    const sample = draws();
    let sum = 0;
    let square = 0;
    for (const d of sample) {
      const p = chiSquared.upper(Math.max(0, wald) * d, q);
      sum += p;
      square += p * p;
    }
    const n = sample.length;
    const mean = sum / n;
    return { mean, error: Math.sqrt(Math.max(0, square / n - mean * mean) / (n - 1)) };
  };
  let error: number | undefined;
  return {
    name,
    df: [q],
    upper: (wald) => moments(wald).mean,
    standardError: (wald) => moments(wald).error,
    get error() {
      error ??= moments(criticalValue((c) => moments(c * c).mean, 0.05, Math.sqrt(2 * q)) ** 2).error;
      return error;
    },
  };
}
