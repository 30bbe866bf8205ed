import { columnOf, counterRandom, type Matrix, matrix } from "../../numeric/index.js";
import { influenceWeights, type Scores } from "../scores.js";
import { addTimes, dot, scale } from "../shape/vectors.js";
import { kernelSum } from "../sums/kernel-sum.js";
import { projectOut } from "./design.js";
import type { FixedB } from "./fixed-b.js";
import { schurFirst } from "./schur.js";

const SEED = 20_250_104;

/**
 * The weights w_i of each restriction over the calendar, orthonormalised: the Wald statistic does not change when the
 * restrictions are recombined, and Rβ̂ − r is then standard normal times σ.
 */
export function restrictedWeights(scores: Scores, restrictions: Matrix): Matrix {
  const { rows: q, columns: k } = restrictions;
  const result = matrix(scores.span, q);
  for (let i = 0; i < q; i++) {
    const contrast = Float64Array.from({ length: k }, (_, j) => restrictions.data[j * q + i]!);
    const w = influenceWeights(scores, contrast);
    for (let pass = 0; pass < 2; pass++) {
      for (let j = 0; j < i; j++) addTimes(w, -dot(columnOf(result, j), w), columnOf(result, j));
    }
    scale(w, 1 / Math.sqrt(dot(w, w)));
    columnOf(result, i).set(w);
  }
  return result;
}

/**
 * Draws of D = 1/(d'S⁻¹d): errors are iid normal, û their residuals on this X, S the kernel estimate from w_t û_t, d a random direction. Draw
 * r depends on the seed and r alone.
 */
export function drawsOnDesign(scores: Scores, weights: Matrix, choice: FixedB, count: number): Float64Array {
  const { basis, span, places } = scores;
  const q = weights.columns;
  const e = new Float64Array(span);
  const direction = new Float64Array(q);
  const result = new Float64Array(count);
  for (let r = 0; r < count; r++) {
    const random = counterRandom(SEED, r);
    if (places) for (const place of places) e[place] = random.normal();
    else random.fillNormal(e);
    projectOut(basis, e);
    const S = kernelSum({ columns: weights, multiplier: e }, choice.kernel, choice.bandwidth);
    random.fillNormal(direction);
    scale(direction, 1 / Math.sqrt(dot(direction, direction)));
    result[r] = choice.factor * along(S.data, direction, q);
  }
  return result;
}

/** 1/(d'S⁻¹d), d turned into the first axis by a reflection. */
function along(S: Float64Array, d: Float64Array, q: number): number {
  if (q === 1) return S[0]!;
  const sign = d[0]! >= 0 ? 1 : -1;
  const v = Float64Array.from(d);
  v[0]! += sign;
  const half = 1 / (1 + Math.abs(d[0]!));
  const turned = new Float64Array(q * q);
  // H S H for H = I − half·v v', which takes d to ∓ the first axis.
  const Sv = new Float64Array(q);
  for (let j = 0; j < q; j++) for (let i = 0; i < q; i++) Sv[i]! += S[j * q + i]! * v[j]!;
  const vSv = dot(v, Sv);
  for (let j = 0; j < q; j++) {
    for (let i = j; i < q; i++) {
      turned[j * q + i] =
        S[j * q + i]! - half * (v[i]! * Sv[j]! + Sv[i]! * v[j]!) + half * half * vSv * v[i]! * v[j]!;
    }
  }
  return schurFirst(turned, q);
}
