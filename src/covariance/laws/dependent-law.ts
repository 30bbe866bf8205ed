import type { ReferenceLaw } from "../../estimate/index.js";
import type { Scores } from "../scores.js";
import { criticalValue } from "./craig.js";
import { dependentSpectrum } from "./dependent.js";
import { type DependentSpectrum, missProbability } from "./dependent-spectrum.js";
import { correlationOperator, type ErrorProcess } from "./error-process.js";
import { designFor, type FixedB } from "./fixed-b.js";
import { lawOf } from "./form-law.js";

/**
 * Dimension of the space that the law is computed in. Short samples, errors that alternate in sign and bandwidths below
 * 1.3 √T spread the eigenvalues out and need more.
 */
function steps(span: number, bandwidth: number, { ar }: ErrorProcess): number {
  const base = span <= 100 || ar.some((phi) => phi < -0.2) ? 64 : 28;
  return Math.round(Math.min(200, base * Math.max(1, (1.3 * Math.sqrt(span)) / bandwidth)));
}

/**
 * The law of a contrast's t ratio under a kernel estimator of fixed bandwidth when the errors follow the given process
 * and are normal: P(|w'u| > c √(factor · û'Qû)) for u ~ N(0, Ω) on this X. Checked against all eigenvalues of the T×T problem:
 * tails near 5 % are right to 1e-4 at bandwidth 1.3 √T.
 */
export function dependentLaw(
  scores: Scores,
  contrast: Float64Array,
  choice: FixedB,
  process: ErrorProcess,
): ReferenceLaw {
  let spectrum: DependentSpectrum | undefined;
  const root = Math.sqrt(choice.factor);
  const miss = (c: number): number => {
    spectrum ??= dependentSpectrum(
      designFor(scores, contrast),
      choice.kernel,
      choice.bandwidth,
      correlationOperator(process, scores.span),
      steps(scores.span, choice.bandwidth, process),
    );
    return c === 0 ? 1 : missProbability(c * root, spectrum);
  };
  return lawOf(`calibrated to ${process.label}`, miss, (alpha) => criticalValue(miss, alpha));
}
