import type { Remark } from "../../data/index.js";
import type { Covariance, Regression } from "../../estimate/index.js";
import { InputError } from "../../numeric/index.js";
import { type Kernel, lastLag } from "../kernels.js";
import { type Law, minds } from "../laws/choice.js";
import { chiSquaredLaw, fisherLaw, normalLaw, studentLaw } from "../laws/classical-laws.js";
import { fixedBForm, fixedBLaw, UNEVEN_DESIGN_UP_TO } from "../laws/fixed-b.js";
import { fixedBJointLaw } from "../laws/fixed-b-joint.js";
import {
  caution,
  exactPeriods,
  missingPeriods,
  nearUnitRoot,
  note,
  notPositive,
  thinData,
} from "../remarks.js";
import { type BandwidthRule, type ChosenBandwidth, chooseBandwidth } from "../rules/bandwidth.js";
import { inRawUnits, rawScores } from "../rules/raw-scores.js";
import { type Scores, scoresOf } from "../scores.js";
import { congruence } from "../shape/sandwich.js";
import { kernelSum } from "../sums/kernel-sum.js";
import { type Prewhitened, prewhiten, SINGULAR_BOUND } from "../sums/prewhiten.js";
import { scoreSeries } from "../sums/series.js";

export interface HacRequest {
  readonly kernel: Kernel;
  readonly bandwidth: number | BandwidthRule;
  readonly prewhiten: boolean;
  readonly factor: boolean;
  readonly law: Law;
  readonly asked: string;
  /** In place of the kernel's name. */
  readonly title?: string;
}

/** What a kernel estimator makes of a regression. */
export function hacCovariance(regression: Regression, request: HacRequest): Covariance {
  const { kernel, law } = request;
  const scores = scoresOf(regression);
  const { T, k, span } = scores;
  const whitened = request.prewhiten ? prewhitened(scores, request.asked) : undefined;
  const raw = whitened
    ? inRawUnits(regression, scores, whitened.series, whitened.loading)
    : rawScores(regression, scores);
  const chosen = chooseBandwidth(request.bandwidth, kernel, raw, scores, request.asked);
  const { bandwidth } = chosen;
  const sum = whitened
    ? whitened.recolour(kernelSum(whitened.series, kernel, bandwidth))
    : kernelSum(scoreSeries(scores), kernel, bandwidth);
  const factor = request.factor ? T / (T - k) : 1;
  const V = congruence(scores.back, sum, factor);
  const lags = lastLag(kernel, bandwidth, span);
  const choice = { kernel, bandwidth, factor, limit: law === "fixed-b limit" };
  const remarks = (): Remark[] => [
    ...(kernel.positive ? [] : notPositive(V, regression.terms)),
    ...chosen.remarks,
    ...bandwidthRemarks(scores, kernel, chosen, law),
    ...(whitened ? whiteningRemarks(whitened, k) : []),
    ...missingPeriods(regression),
    ...thinData(regression),
    ...nearUnitRoot(regression),
    ...exactPeriods(regression),
  ];
  let made: Remark[] | undefined;
  return {
    label: labelOf(request, chosen, lags, span),
    matrix: V,
    details: {
      kernel: kernel.name,
      bandwidth,
      lags,
      rule: chosen.rule,
      factor,
      law,
      b: bandwidth / span,
      prewhitened: request.prewhiten,
      ...(whitened ? { "largest singular value": whitened.largestSingularValue } : {}),
      ...chosen.details,
    },
    get remarks() {
      made ??= remarks();
      return made;
    },
    reference(contrast) {
      if (law === "normal") return normalLaw();
      return law === "t" ? studentLaw(T - k) : fixedBLaw(scores, contrast, choice);
    },
    joint(restrictions) {
      const q = restrictions.rows;
      if (q > T - k) {
        throw new InputError(
          `${request.asked}: ${q} restrictions are more than the ${T - k} degrees of freedom that ${T} periods and ${k} coefficients leave.`,
        );
      }
      if (law === "normal") return chiSquaredLaw(q);
      return law === "t" ? fisherLaw(q, T - k) : fixedBJointLaw(scores, restrictions, choice);
    },
  };
}

function prewhitened(scores: Scores, asked: string): Prewhitened {
  if (scores.span > scores.T) {
    throw new InputError(
      `${asked}: prewhitening follows the scores from one period to the next, and ${scores.span - scores.T} periods are missing. ` +
        `Fill them, fit a stretch without gaps, or leave prewhiten out.`,
    );
  }
  if (scores.T < 2 * scores.k + 2) {
    throw new InputError(
      `${asked}: ${scores.T} periods are too few to fit a vector autoregression to ${scores.k} scores. Leave prewhiten out.`,
    );
  }
  return prewhiten(scoreSeries(scores));
}

function labelOf(request: HacRequest, chosen: ChosenBandwidth, lags: number, span: number): string {
  const { kernel, prewhiten: whitened, title = kernel.title } = request;
  const S = chosen.bandwidth;
  const shown = Number.isInteger(S) ? String(S) : S.toFixed(2);
  const count = kernel.finite || lags < span - 1 ? String(lags) : `all ${lags}`;
  const how = chosen.rule === "given" || request.title ? "" : ` (${chosen.rule})`;
  return `${title}${how}${whitened ? ", prewhitened" : ""}, ${count} ${lags === 1 ? "lag" : "lags"} (bandwidth ${shown})`;
}

function bandwidthRemarks(
  scores: Scores,
  kernel: Kernel,
  { bandwidth, fromData }: ChosenBandwidth,
  law: Law,
): Remark[] {
  const remarks: Remark[] = [];
  const { span, k } = scores;
  if (bandwidth > span / 2) {
    remarks.push(caution(`Bandwidth ${bandwidth.toFixed(1)} is more than half of the ${span} periods.`));
  }
  if (!minds(law)) {
    const why = kernel.positive ? "" : ` (the ${kernel.title} kernel has no fixed-b law here)`;
    remarks.push(caution(`Critical values ignore the bandwidth${why}: intervals are too narrow.`));
    return remarks;
  }
  if (fromData) {
    remarks.push(note("The bandwidth comes from the data; the critical values take it as fixed."));
  }
  // Below, every contrast has its own design's law; above, that is too dear and the limit may not hold.
  const limit = law === "fixed-b limit";
  for (let a = 0; a < k && (limit || span > UNEVEN_DESIGN_UP_TO); a++) {
    const unit = new Float64Array(k);
    unit[a] = 1;
    if (fixedBForm(scores, unit, limit) !== "limit, uneven design") continue;
    remarks.push(
      caution(
        "Critical values are those of regressors that vary evenly over time; some here trend or shift, for which they are too small.",
      ),
    );
    break;
  }
  return remarks;
}

function whiteningRemarks(whitened: Prewhitened, k: number): Remark[] {
  const remarks: Remark[] = [];
  if (whitened.bounded) {
    remarks.push(
      caution(
        `The scores' autoregression is near a unit root: its largest singular value ${whitened.largestSingularValue.toFixed(3)} was held at ` +
          `${SINGULAR_BOUND}, and the standard errors depend on that.`,
      ),
    );
  }
  if (whitened.rank < k) {
    remarks.push(note(`The scores move in ${whitened.rank} of ${k} directions; prewhitening acts in those.`));
  }
  return remarks;
}
