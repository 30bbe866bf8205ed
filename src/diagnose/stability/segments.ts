import type { Regression } from "../../estimate/index.js";
import { recursion } from "./recursion.js";

/** A partition of the rows: the rows before each break, and the residual sum of squares of fitting the parts apart. */
export interface Partition {
  readonly breaks: readonly number[];
  readonly rss: number;
}

/**
 * The partitions into 1, 2, ... `most`+1 parts with the smallest residual sum of squares, each part at least `shortest` rows
 * (Bai and Perron 1998, 2003): dynamic programming over the sums of squares of all segments. Up to 400 rows every date is a
 * candidate; beyond, a grid of `candidates` dates, after which each break in turn is moved to its best date between its
 * neighbours, until none moves. Terms that do not vary in a segment take no part there.
 */
export function bestPartitions(
  m: Regression,
  most: number,
  shortest: number,
  candidates = m.T <= 400 ? m.T : m.T <= 2000 ? 200 : 100,
): Partition[] {
  const { T } = m;
  const step = Math.max(1, T / candidates);
  const points = Array.from({ length: Math.floor(T / step) }, (_, i) => Math.round(i * step));
  points.push(T);
  const ends = [...new Set(points)];
  const cost = ends.map((from) => segmentCosts(m, from, ends));
  const n = ends.length;
  const partitions: Partition[] = [{ breaks: [], rss: cost[0]![n - 1]! }];
  let best = cost[0]!.slice();
  const trace: Int32Array[] = [];
  for (let parts = 2; parts <= most + 1; parts++) {
    const next = new Float64Array(n).fill(Number.POSITIVE_INFINITY);
    const from = new Int32Array(n).fill(-1);
    for (let j = 0; j < n; j++)
      for (let i = 1; i < j; i++) {
        if (ends[j]! - ends[i]! < shortest || ends[i]! < (parts - 1) * shortest) continue;
        const value = best[i]! + cost[i]![j]!;
        if (value < next[j]!) {
          next[j] = value;
          from[j] = i;
        }
      }
    trace.push(from);
    best = next;
    if (!Number.isFinite(next[n - 1]!)) break;
    const breaks: number[] = [];
    for (let p = trace.length - 1, j = n - 1; p >= 0; p--) {
      j = trace[p]![j]!;
      breaks.unshift(ends[j]!);
    }
    partitions.push(step > 1 ? refined(m, breaks, shortest) : { breaks, rss: next[n - 1]! });
  }
  return partitions;
}

/** Residual sum of squares of the rows from `from` up to each of `ends`; infinite where that is not beyond `from`. */
function segmentCosts(m: Regression, from: number, ends: readonly number[]): Float64Array {
  const result = new Float64Array(ends.length).fill(Number.POSITIVE_INFINITY);
  if (from >= m.T) return result;
  const { rss } = recursion(m, m.residuals, from, m.T - 1);
  ends.forEach((end, j) => {
    if (end > from) result[j] = rss[end - from - 1]!;
  });
  return result;
}

function refined(m: Regression, start: readonly number[], shortest: number): Partition {
  const breaks = [...start];
  for (let round = 0, moved = true; moved && round < 10; round++) {
    moved = false;
    for (let i = 0; i < breaks.length; i++) {
      const left = i === 0 ? 0 : breaks[i - 1]!;
      const right = i === breaks.length - 1 ? m.T : breaks[i + 1]!;
      const forward = recursion(m, m.residuals, left, right - 1).rss;
      const backward = recursion(m, m.residuals, right - 1, left).rss;
      let best = breaks[i]!;
      const value = (at: number) => forward[at - left - 1]! + backward[right - at - 1]!;
      for (let at = left + shortest; at <= right - shortest; at++) if (value(at) < value(best)) best = at;
      if (best !== breaks[i]) {
        breaks[i] = best;
        moved = true;
      }
    }
  }
  const cuts = [0, ...breaks, m.T];
  let rss = 0;
  for (let i = 0; i + 1 < cuts.length; i++) {
    const part = recursion(m, m.residuals, cuts[i]!, cuts[i + 1]! - 1).rss;
    rss += part[part.length - 1]!;
  }
  return { breaks, rss };
}
