import { columnOf, matrix } from "../../numeric/index.js";
import type { Scores } from "../scores.js";
import { goldenMinimum } from "../shape/golden.js";

/** An AR(1) coefficient fitted to a regression's errors. */
export interface FittedAr1 {
  readonly rho: number;
  /** Whether the likelihood still rises at the end of the range, |ρ| = 0.995. */
  readonly atBound: boolean;
  /** Local maxima of the restricted likelihood. */
  readonly maxima: number;
}

const BOUND = 0.995;
const known = new WeakMap<Scores, FittedAr1>();

/**
 * ρ of AR(1) errors by restricted maximum likelihood (Patterson and Thompson 1971; Cooper and Thompson 1977), which
 * takes account of the k coefficients that the residuals were fitted with: it minimises
 * (T − k) ln S + ln|Ω| + ln|X'Ω⁻¹X|. One pass over the data gives cross products, after which a value of ρ costs O(k³).
 * Across d − 1 missing periods the errors are joined by ρ^d.
 */
export function fitAr1(scores: Scores): FittedAr1 {
  let fitted = known.get(scores);
  if (!fitted) {
    fitted = fit(criterionOf(scores));
    known.set(scores, fitted);
  }
  return fitted;
}

function fit(criterion: (rho: number) => number): FittedAr1 {
  const points = 100;
  const at = (i: number): number => -BOUND + (2 * BOUND * i) / points;
  const values = Float64Array.from({ length: points + 1 }, (_, i) => criterion(at(i)));
  let best = 0;
  let maxima = 0;
  for (let i = 0; i <= points; i++) {
    const below = i === 0 || values[i]! < values[i - 1]!;
    const above = i === points || values[i]! <= values[i + 1]!;
    if (below && above) maxima++;
    if (values[i]! < values[best]!) best = i;
  }
  if (best === 0 || best === points) return { rho: at(best), atBound: true, maxima };
  return { rho: goldenMinimum(criterion, at(best - 1), at(best + 1), 1e-10), atBound: false, maxima };
}

/** Moments of neighbours d periods apart: of the later, of both, and of the earlier rows of [Q û]. */
interface Neighbours {
  readonly gap: number;
  pairs: number;
  readonly later: Float64Array;
  readonly both: Float64Array;
  readonly earlier: Float64Array;
}

function criterionOf(scores: Scores): (rho: number) => number {
  const { T, k } = scores;
  const m = k + 1;
  const { first, groups } = moments(scores);
  return (rho) => {
    const W = new Float64Array(m * m);
    const one = 1 - rho * rho;
    for (let i = 0; i < m * m; i++) W[i] = one * first[i]!;
    let logOmega = -Math.log(one);
    for (const { gap, pairs, later, both, earlier } of groups) {
      const power = rho ** gap;
      const ratio = gap === 1 ? 1 : one / (1 - power * power);
      for (let i = 0; i < m * m; i++) {
        W[i]! += ratio * (later[i]! - power * both[i]! + power * power * earlier[i]!);
      }
      if (gap !== 1) logOmega -= pairs * Math.log(ratio);
    }
    const { logBlock, logLast } = logPivots(W, m);
    return (T - k) * logLast + logOmega + logBlock;
  };
}

/** Logarithms of the determinant of the leading (m−1)×(m−1) block and of the last pivot of a positive matrix. */
function logPivots(W: Float64Array, m: number): { logBlock: number; logLast: number } {
  let logBlock = 0;
  for (let p = 0; p < m; p++) {
    const pivot = W[p * m + p]!;
    if (p === m - 1) return { logBlock, logLast: Math.log(Math.max(pivot, Number.MIN_VALUE)) };
    logBlock += Math.log(Math.max(pivot, Number.MIN_VALUE));
    for (let i = p + 1; i < m; i++) {
      const factor = W[p * m + i]! / pivot;
      for (let j = p + 1; j < m; j++) W[j * m + i]! -= factor * W[j * m + p]!;
    }
  }
  return { logBlock, logLast: 0 };
}

function moments({ basis, residuals, k, span, places }: Scores): {
  first: Float64Array;
  groups: Neighbours[];
} {
  const m = k + 1;
  let square = 0;
  for (const e of residuals) square += e * e;
  const scale = 1 / Math.sqrt(square);
  // Rows of [Q û] side by side in memory: every product below reads two of them.
  const rows = matrix(m, span);
  for (let j = 0; j < k; j++) {
    const q = columnOf(basis, j);
    for (let t = 0; t < span; t++) rows.data[t * m + j] = q[t]!;
  }
  for (let t = 0; t < span; t++) rows.data[t * m + k] = scale * residuals[t]!;
  const first = new Float64Array(m * m);
  product(first, rows.data, 0, 0, m);
  const groups = new Map<number, Neighbours>();
  const count = places ? places.length : span;
  for (let i = 1; i < count; i++) {
    const now = places ? places[i]! : i;
    const before = places ? places[i - 1]! : i - 1;
    let group = groups.get(now - before);
    if (!group) {
      const zeros = (): Float64Array => new Float64Array(m * m);
      group = { gap: now - before, pairs: 0, later: zeros(), both: zeros(), earlier: zeros() };
      groups.set(now - before, group);
    }
    group.pairs++;
    product(group.later, rows.data, now * m, now * m, m);
    product(group.both, rows.data, now * m, before * m, m);
    product(group.earlier, rows.data, before * m, before * m, m);
  }
  for (const { both } of groups.values()) addTranspose(both, m);
  return { first, groups: [...groups.values()] };
}

/** sum += a b' for rows a, b of length m that start at the given places. */
function product(sum: Float64Array, rows: Float64Array, a: number, b: number, m: number): void {
  for (let j = 0; j < m; j++) {
    const value = rows[b + j]!;
    for (let i = 0; i < m; i++) sum[j * m + i]! += rows[a + i]! * value;
  }
}

function addTranspose(a: Float64Array, m: number): void {
  for (let j = 0; j < m; j++) {
    for (let i = 0; i <= j; i++) a[j * m + i] = a[i * m + j] = a[j * m + i]! + a[i * m + j]!;
  }
}
