import type { JointLaw } from "../../estimate/index.js";
import { columnOf, counterRandom, type Matrix } from "../../numeric/index.js";
import type { Scores } from "../scores.js";
import { dot } from "../shape/vectors.js";
import { kernelSum } from "../sums/kernel-sum.js";
import { projectOut } from "./design.js";
import { autocorrelations, type ErrorProcess } from "./error-process.js";
import type { FixedB } from "./fixed-b.js";
import { restrictedWeights } from "./joint-design.js";
import { quadratic } from "./schur.js";

const SEED = 20_250_105;
const DRAWS = 4000;
/** What is left of the start when the sample begins. */
const FORGOTTEN = 1e-6;

/**
 * The law of a Wald statistic when the errors follow the given process, from 4,000 draws on this X. Here the contrasts and the
 * residuals are not independent, so the share of draws beyond W is what there is: (1 + beyond)/(1 + draws).
 */
export function dependentJointLaw(
  scores: Scores,
  restrictions: Matrix,
  choice: FixedB,
  process: ErrorProcess,
): JointLaw & { standardError(wald: number): number } {
  const q = restrictions.rows;
  let sorted: Float64Array | undefined;
  const upper = (wald: number): number => {
    if (Number.isNaN(wald)) return Number.NaN;
    sorted ??= draw(scores, restrictedWeights(scores, restrictions), choice, process).sort();
    let low = 0;
    let high = DRAWS;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (sorted[middle]! >= wald) high = middle;
      else low = middle + 1;
    }
    return (1 + DRAWS - low) / (1 + DRAWS);
  };
  const standardError = (p: number): number => Math.sqrt((p * (1 - p)) / DRAWS);
  return {
    name: `calibrated to ${process.label}, q = ${q}, ${DRAWS} draws`,
    df: [q],
    upper,
    error: standardError(0.05),
    standardError: (wald) => standardError(upper(wald)),
  };
}

function draw(scores: Scores, weights: Matrix, choice: FixedB, process: ErrorProcess): Float64Array {
  const { basis, places, span } = scores;
  const q = weights.columns;
  const u = new Float64Array(span);
  const z = new Float64Array(q);
  const before = memory(process);
  const result = new Float64Array(DRAWS);
  for (let r = 0; r < DRAWS; r++) {
    simulate(process, counterRandom(SEED, r), before, u);
    if (places) keep(u, places);
    for (let i = 0; i < q; i++) z[i] = dot(columnOf(weights, i), u);
    projectOut(basis, u);
    const S = kernelSum({ columns: weights, multiplier: u }, choice.kernel, choice.bandwidth);
    result[r] = quadratic(S.data, z, q) / choice.factor;
  }
  return result;
}

/** Periods after which a shock has died out to one part in a million. */
function memory(process: ErrorProcess): number {
  const gamma = autocorrelations(process, 20_000);
  let last = gamma.length - 1;
  while (last > 0 && Math.abs(gamma[last]!) < FORGOTTEN) last--;
  return last + process.ma.length + 1;
}

/** A stretch of the process with unit innovations, run `before` periods ahead of the sample. */
function simulate(
  { ar, ma }: ErrorProcess,
  random: { normal(): number },
  before: number,
  out: Float64Array,
): void {
  const p = ar.length;
  const q = ma.length;
  const values = new Float64Array(before + out.length);
  const shocks = new Float64Array(before + out.length);
  for (let t = 0; t < values.length; t++) {
    shocks[t] = random.normal();
    let value = shocks[t]!;
    for (let i = 0; i < p && i < t; i++) value += ar[i]! * values[t - 1 - i]!;
    for (let j = 0; j < q && j < t; j++) value += ma[j]! * shocks[t - 1 - j]!;
    values[t] = value;
  }
  out.set(values.subarray(before));
}

function keep(x: Float64Array, places: Int32Array): void {
  const kept = new Float64Array(x.length);
  for (const place of places) kept[place] = x[place]!;
  x.set(kept);
}
