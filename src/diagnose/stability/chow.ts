import type { Regression } from "../../estimate/index.js";
import { columnOf } from "../../numeric/index.js";
import { auxiliaryRegression } from "../parts/auxiliary-regression.js";
import { fisherTest, notComputed } from "../parts/laws.js";
import { addColumns, basisColumns } from "../parts/projection.js";
import { robustWald } from "../parts/robust-wald.js";
import type { Test } from "../test.js";
import { recursion } from "./recursion.js";

/**
 * Chow's (1960) test for a break after the first `rowsBefore` rows: the terms times a step added, F over what that explains (a
 * term that does not vary on one side takes no part). With too few rows on one side for all terms, his predictive form:
 * what those rows add to the residual sum of squares of the others. Even, independent errors.
 */
export function chow(m: Regression, rowsBefore: number): Test {
  const name = "Chow";
  const { T, k } = m;
  const after = T - rowsBefore;
  if (Math.min(rowsBefore, after) <= k) return predictive(m, rowsBefore);
  const { rss, rank } = addColumns(m.residuals, basisColumns(m.Q), stepped(m, rowsBefore), 1e-7);
  const q = rank[k]!;
  const rest = T - k - q;
  if (q === 0 || rest < 1)
    return notComputed(name, `${rowsBefore} and ${after} rows do not determine the terms`);
  const left = rss[k]!;
  return fisherTest(name, (rss[0]! - left) / q / (left / rest), q, rest);
}

function predictive(m: Regression, rowsBefore: number): Test {
  const name = "Chow, predictive";
  const { T } = m;
  const early = rowsBefore >= T - rowsBefore;
  const kept = early ? rowsBefore : T - rowsBefore;
  const left = T - kept;
  const pass = early ? recursion(m, m.y, 0, kept - 1) : recursion(m, m.y, T - 1, T - kept);
  const rest = kept - pass.rank[kept - 1]!;
  // rows that first determine a term cannot contradict the others
  const extra = left - (m.k - pass.rank[kept - 1]!);
  if (left < 1 || rest < 1 || extra < 1) return notComputed(name, `${kept} rows are too few`);
  const sum = pass.rss[kept - 1]!;
  return fisherTest(name, (m.rss - sum) / extra / (sum / rest), extra, rest);
}

/** The same break by a Wald test that allows for dependent and uneven errors. */
export function robustChow(m: Regression, rowsBefore: number): Test {
  const name = "Chow, robust";
  const { directions } = addColumns(m.residuals, basisColumns(m.Q), stepped(m, rowsBefore), 1e-7);
  const q = directions.length;
  if (q === 0 || m.T - m.k - q < 1) return notComputed(name, "the terms are not determined on both sides");
  const scale = Math.sqrt(m.T);
  const columns = Array.from({ length: m.k }, (_, j) => columnOf(m.X, j));
  const auxiliary = auxiliaryRegression(
    m.y,
    [...columns, ...directions.map((d) => d.map((x) => x * scale))],
    [...m.terms, ...directions.map((_, i) => `break ${i + 1}`)],
    m.periods,
    { interceptAt: m.interceptAt },
  );
  return robustWald(
    name,
    auxiliary,
    directions.map((_, i) => m.k + i),
  );
}

function stepped(m: Regression, rowsBefore: number): Float64Array[] {
  return basisColumns(m.Q).map((q) => q.map((x, t) => (t >= rowsBefore ? x : 0)));
}
