import type { ReferenceLaw } from "../../estimate/index.js";
import type { Scores } from "../scores.js";
import { dotAt } from "../shape/vectors.js";
import { criticalValue } from "./craig.js";
import { dependentSpectrum } from "./dependent.js";
import { type DependentSpectrum, missProbability } from "./dependent-spectrum.js";
import type { ContrastDesign } from "./design.js";
import { correlationOperator, type ErrorProcess } from "./error-process.js";
import { designFor, type FixedB } from "./fixed-b.js";
import { lawOf } from "./form-law.js";

/**
 * Dimension of the space that the law is computed in. About 2/b eigenvalues of B matter (measured); three times as
 * many where the errors run against the contrast, one alternating while the other lasts. On short samples more cost
 * nothing.
 */
function steps(design: ContrastDesign, bandwidth: number, { ar, ma }: ErrorProcess): number {
  const { weights } = design;
  const span = weights.length;
  if (span <= 100) return 64;
  const lasting = dotAt(weights, 1, weights, 0, span - 1) * (ar[0] ?? ma[0] ?? 0);
  return Math.min(160, Math.ceil(((lasting < -0.03 ? 6 : 2.4) * span) / bandwidth));
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
    const design = designFor(scores, contrast);
    spectrum ??= dependentSpectrum(
      design,
      choice.kernel,
      choice.bandwidth,
      correlationOperator(process, scores.span),
      steps(design, choice.bandwidth, process),
    );
    return c === 0 ? 1 : missProbability(c * root, spectrum);
  };
  return lawOf(`calibrated to ${process.label}`, miss, (alpha) => criticalValue(miss, alpha));
}
