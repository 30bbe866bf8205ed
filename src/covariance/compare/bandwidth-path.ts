import { type Remark, suggestion } from "../../data/index.js";
import { autocovariances, InputError } from "../../numeric/index.js";
import { type Kernel, type KernelName, kernelNamed, lagWeights, lastLag } from "../kernels.js";
import { caution, note } from "../remarks.js";
import { bandwidthRules, chooseBandwidth, requireBandwidth, ruleTitle } from "../rules/bandwidth.js";
import { rawScores } from "../rules/raw-scores.js";
import { influenceSeries, scoresOf } from "../scores.js";
import { aboutFit, type Fitted, requireFit } from "../subject.js";
import { BandwidthPath, type RuleMark } from "./path-result.js";

export interface BandwidthPathOptions {
  /** `bartlett` unless said. */
  readonly kernel?: KernelName;
  /** Multiply variances by T/(T − k); true unless said. */
  readonly factor?: boolean;
}

/** Products a path may take; beyond that its bandwidths are thinned out. */
const WORK = 30_000_000;

/**
 * The standard error of one coefficient at every whole bandwidth from 0 to half the sample, and where each rule would put it. One pass
 * over the coefficient's influence series w_t û_t gives all its autocovariances; Bartlett then costs nothing a bandwidth, the others O(S). On
 * long samples the other kernels' bandwidths are thinned out, and a remark says so.
 *
 * @throws InputError for an unknown term or kernel.
 */
export function bandwidthPath(m: Fitted, term: string, options: BandwidthPathOptions = {}): BandwidthPath {
  requireFit(m, "bandwidthPath");
  const kernel = kernelNamed(options.kernel ?? "bartlett", "bandwidthPath");
  const { regression } = m;
  const { terms, T, k, gramInverse, rss } = regression;
  const a = terms.indexOf(term);
  if (a < 0) {
    throw new InputError(
      `bandwidthPath: the fit has no term ${JSON.stringify(term)}.${suggestion(term, terms)}`,
    );
  }
  const scores = scoresOf(regression);
  const contrast = new Float64Array(k);
  contrast[a] = 1;
  const factor = (options.factor ?? true) ? T / (T - k) : 1;
  const gamma = autocovariances(influenceSeries(scores, contrast), scores.span - 1);
  const half = Math.floor(scores.span / 2);
  const bandwidths = kernel.name === "bartlett" ? whole(half) : thinned(half, kernel);
  const variances =
    kernel.name === "bartlett"
      ? bartlettPath(gamma, bandwidths)
      : bandwidths.map((S) => weighted(gamma, kernel, S));
  const root = (variance: number): number => (variance > 0 ? Math.sqrt(factor * variance) : Number.NaN);
  const se = variances.map(root);
  const marks = rulesFor(kernel).map((rule): RuleMark => {
    const { bandwidth } = chooseBandwidth(
      rule,
      kernel,
      rawScores(regression, scores),
      scores,
      "bandwidthPath",
    );
    return { rule: ruleTitle(rule), bandwidth, se: root(weighted(gamma, kernel, bandwidth)) };
  });
  return new BandwidthPath({
    about: aboutFit(m),
    outcome: m.outcome,
    term,
    kernel: kernel.name,
    bandwidths,
    se,
    classicalSe: Math.sqrt((rss / (T - k)) * gramInverse.data[a * k + a]!),
    marks,
    finding: pathFinding(term, bandwidths, se, kernel),
    remarks: pathRemarks(se, bandwidths, half),
  });
}

function rulesFor(kernel: Kernel): (typeof bandwidthRules)[number][] {
  return bandwidthRules.filter((rule) => {
    try {
      requireBandwidth(rule, kernel, "bandwidthPath");
      return true;
    } catch (error) {
      if (error instanceof InputError) return false;
      throw error;
    }
  });
}

const whole = (half: number): Float64Array => Float64Array.from({ length: half + 1 }, (_, S) => S);

/** Every whole bandwidth while they are affordable, else ever wider steps. */
function thinned(half: number, kernel: Kernel): Float64Array {
  const cost = kernel.finite ? half ** 2 / 2 : 2 * half ** 2;
  if (cost <= WORK) return whole(half);
  const count = Math.max(40, Math.floor(WORK / (kernel.finite ? half / 3 : 2 * half)));
  const grid = new Set<number>([0]);
  for (let i = 0; i <= count; i++) grid.add(Math.round(half ** (i / count)));
  return Float64Array.from(grid);
}

/** γ_0 + 2 Σ_{j < S} (1 − j/S) γ_j for every S from two running sums. */
function bartlettPath(gamma: Float64Array, bandwidths: Float64Array): Float64Array {
  const result = new Float64Array(bandwidths.length);
  let sum = 0;
  let moment = 0;
  for (let S = 0; S < bandwidths.length; S++) {
    if (S >= 2) {
      sum += gamma[S - 1]!;
      moment += (S - 1) * gamma[S - 1]!;
    }
    result[S] = gamma[0]! + (S > 0 ? 2 * (sum - moment / S) : 0);
  }
  return result;
}

function weighted(gamma: Float64Array, kernel: Kernel, bandwidth: number): number {
  const last = lastLag(kernel, bandwidth, gamma.length);
  const weights = lagWeights(kernel, bandwidth, last);
  let sum = 0;
  for (let j = last; j > 0; j--) sum += weights[j]! * gamma[j]!;
  return gamma[0]! + 2 * sum;
}

function pathFinding(term: string, bandwidths: Float64Array, se: Float64Array, kernel: Kernel): string {
  let least = -1;
  let most = -1;
  se.forEach((value, i) => {
    if (Number.isNaN(value)) return;
    if (least < 0 || value < se[least]!) least = i;
    if (most < 0 || value > se[most]!) most = i;
  });
  if (least < 0) return `No bandwidth gives ${term} a positive variance.`;
  const ratio = (se[most]! / se[least]!).toFixed(2);
  return (
    `Over all bandwidths the standard error of ${term} varies by a factor of ${ratio} (${kernel.title}): ` +
    `smallest at ${bandwidths[least]}, largest at ${bandwidths[most]}.`
  );
}

function pathRemarks(se: Float64Array, bandwidths: Float64Array, half: number): Remark[] {
  const remarks: Remark[] = [];
  const negative = se.filter(Number.isNaN).length;
  if (negative > 0) {
    remarks.push(
      caution(
        `At ${negative} of ${se.length} bandwidths the variance came out negative: no standard error there.`,
      ),
    );
  }
  if (bandwidths.length < half + 1) {
    remarks.push(note(`${bandwidths.length} of the ${half + 1} whole bandwidths are shown.`));
  }
  return remarks;
}
