import type { ReferenceLaw } from "../../estimate/index.js";
import type { Kernel } from "../kernels.js";
import type { Scores } from "../scores.js";
import { type ContrastDesign, contrastDesign, hacForm } from "./design.js";
import { formLaw } from "./form-law.js";
import { limitLaw } from "./limit.js";
import { unevenness } from "./unevenness.js";

/** Up to here the law is that of the design at hand. */
export const OWN_DESIGN_UP_TO = 1000;
/** Up to here it is so where the limit does not apply. */
export const UNEVEN_DESIGN_UP_TO = 50_000;
/** Unevenness above which the limit law is not used. */
export const UNEVEN = 0.1;

export interface FixedB {
  readonly kernel: Kernel;
  readonly bandwidth: number;
  /** The factor that the variance carries, T/(T − k) or 1. */
  readonly factor: number;
  /** The limit form at any length of sample. */
  readonly limit?: boolean;
}

/** Which of the two forms a contrast's law takes. */
export type FixedBForm = "own design" | "limit" | "limit, uneven design";

const designs = new WeakMap<Scores, Map<string, ContrastDesign>>();

/** The contrast's design, formed once per regression and contrast. */
export function designFor(scores: Scores, contrast: Float64Array): ContrastDesign {
  let ofScores = designs.get(scores);
  if (!ofScores) {
    ofScores = new Map();
    designs.set(scores, ofScores);
  }
  const key = contrast.join();
  let design = ofScores.get(key);
  if (!design) {
    design = contrastDesign(scores, contrast);
    if (ofScores.size > 200) ofScores.clear();
    ofScores.set(key, design);
  }
  return design;
}

export function fixedBForm(scores: Scores, contrast: Float64Array, limit = false): FixedBForm {
  if (!limit && scores.span <= OWN_DESIGN_UP_TO) return "own design";
  if (unevenness(scores, contrast) <= UNEVEN) return "limit";
  return !limit && scores.span <= UNEVEN_DESIGN_UP_TO ? "own design" : "limit, uneven design";
}

/** b as a label writes it. */
export function shownB(b: number): string {
  return b < 0.0095 ? b.toPrecision(1) : b.toFixed(2);
}

/** The law of a contrast's t ratio under a kernel estimator, its bandwidth taken as fixed. */
export function fixedBLaw(scores: Scores, contrast: Float64Array, choice: FixedB): ReferenceLaw {
  const b = choice.bandwidth / scores.span;
  const form = fixedBForm(scores, contrast, choice.limit);
  const shown = shownB(b);
  if (form === "own design")
    return ownDesignLaw(scores, contrast, choice, `fixed-b, b = ${shown}, on this design`);
  return limitLaw(choice.kernel, b, `fixed-b, b = ${shown}, in the limit`);
}

/**
 * Exact for iid normal errors and a bandwidth that was fixed beforehand, whatever the regressors: trends, steps
 * and random walks included.
 */
export function ownDesignLaw(
  scores: Scores,
  contrast: Float64Array,
  choice: FixedB,
  name: string,
): ReferenceLaw {
  const { kernel, bandwidth, factor } = choice;
  return formLaw(name, () => hacForm(designFor(scores, contrast), kernel, bandwidth), factor);
}
