import type { Regression } from "../../estimate/index.js";
import { columnOf, RankDeficient } from "../../numeric/index.js";
import { auxiliaryRegression } from "../parts/auxiliary-regression.js";
import type { Test } from "../test.js";
import { bestPartitions, type Partition } from "./segments.js";
import { type SearchOptions, supWald } from "./sup-wald.js";

/** How many breaks, and where. */
export interface SeveralBreaks {
  /** The best partitions into 1, 2, ... parts. */
  readonly partitions: readonly (Partition & { readonly bic: number })[];
  /** One more break given l, for l = 0, 1, ...: the tests in the order they were made. */
  readonly tests: readonly Test[];
  /** Number of breaks that the tests come to, and that BIC comes to. */
  readonly byTests: number;
  readonly byBic: number;
}

/**
 * Breaks added one at a time (Bai and Perron 1998): given the best l of them, the largest sup-Wald over the parts, robust form;
 * with p that of one part, the part with the smallest has 1 − (1 − p)^(l+1). Stops at the first that does not reach 1 − level.
 * BIC counts k coefficients a part and one for each date.
 */
export function severalBreaks(
  m: Regression,
  level: number,
  most: number,
  options: SearchOptions,
  first: Test,
): SeveralBreaks {
  const trim = options.trim ?? 0.15;
  const shortest = Math.max(m.k + 1, Math.ceil(trim * m.T));
  const possible = Math.max(0, Math.min(most, Math.floor(m.T / shortest) - 1));
  const partitions = bestPartitions(m, possible, shortest).map((partition) => ({
    ...partition,
    bic:
      m.T * Math.log(partition.rss / m.T) +
      ((partition.breaks.length + 1) * m.k + partition.breaks.length) * Math.log(m.T),
  }));
  const tests: Test[] = [];
  let byTests = 0;
  for (let l = 0; l < possible; l++) {
    const test = l === 0 ? first : oneMore(m, partitions[l]!.breaks, options);
    if (Number.isNaN(test.p)) break;
    tests.push({
      ...test,
      name: l === 0 ? "One break" : `Break ${l + 1} given ${l}`,
    });
    if (!(test.p < 1 - level)) break;
    byTests = l + 1;
    if (!partitions[byTests]) break;
  }
  const byBic = partitions.reduce((best, p, i) => (p.bic < partitions[best]!.bic ? i : best), 0);
  return { partitions, tests, byTests: Math.min(byTests, partitions.length - 1), byBic };
}

function oneMore(m: Regression, breaks: readonly number[], options: SearchOptions): Test {
  const cuts = [0, ...breaks, m.T];
  let strongest: Test | undefined;
  let parts = 0;
  for (let i = 0; i + 1 < cuts.length; i++) {
    const part = rowsOf(m, cuts[i]!, cuts[i + 1]!);
    if (!part) continue;
    const { robust } = supWald(part, options);
    parts++;
    if (!strongest || robust.p < strongest.p || Number.isNaN(strongest.p)) strongest = robust;
  }
  if (!strongest)
    return { name: "", statistic: Number.NaN, df: [], distribution: "", p: Number.NaN, valid: false };
  return { ...strongest, p: 1 - (1 - strongest.p) ** parts };
}

/** The regression on rows `from` .. `to` − 1, terms that do not vary there left out; nothing where too few rows are left. */
function rowsOf(m: Regression, from: number, to: number): Regression | undefined {
  const columns: Float64Array[] = [];
  const labels: string[] = [];
  let interceptAt = -1;
  for (let j = 0; j < m.k; j++) {
    const x = columnOf(m.X, j).slice(from, to);
    if (x.every((v) => v === 0)) continue;
    if (j === m.interceptAt) interceptAt = columns.length;
    columns.push(x);
    labels.push(m.terms[j]!);
  }
  if (to - from < 2 * (columns.length + 1) || columns.length === 0) return undefined;
  try {
    return auxiliaryRegression(m.y.slice(from, to), columns, labels, m.periods.slice(from, to), {
      interceptAt,
      laggedOutcome: m.laggedOutcome,
    });
  } catch (problem) {
    if (problem instanceof RankDeficient) return undefined;
    throw problem;
  }
}
