import { listed } from "../remarks.js";
import { percent } from "../words.js";
import type { ComparedCoefficient, ComparedEstimator } from "./comparison.js";

/**
 * Which conclusions hold under all estimators, which under some, and by which the width changes most. The intercept is
 * spoken of only when nothing else is there.
 */
export function comparisonFinding(
  coefficients: readonly ComparedCoefficient[],
  estimators: readonly ComparedEstimator[],
  level: number,
  intercept: string | undefined,
): string {
  const spoken = coefficients.filter(({ term }) => term !== intercept);
  const rows = (spoken.length > 0 ? spoken : coefficients).filter(({ judged }) => judged > 0);
  if (rows.length === 0) return "No estimator gives an interval.";
  return `At ${percent(level)} ${conclusions(rows, estimators.length)}. ${widest(rows, estimators)}`;
}

function conclusions(rows: readonly ComparedCoefficient[], count: number): string {
  const of = (holds: ComparedCoefficient["holds"]): string[] =>
    rows.filter((row) => row.holds === holds).map(({ term }) => term);
  const verb = (names: readonly string[]): string => (names.length === 1 ? "differs" : "differ");
  const all = of("all");
  const none = of("none");
  const some = rows
    .filter((row) => row.holds === "some")
    .map(({ term, apart, judged }) => `${term} (${apart} of ${judged})`);
  const every = count === 1 ? "under the one estimator" : `under all ${count} estimators`;
  const parts: string[] = [];
  if (all.length > 0) parts.push(`${listed(all)} ${verb(all)} from zero ${every}`);
  if (some.length > 0) parts.push(`${listed(some)} ${verb(some)} under some`);
  if (none.length > 0) {
    parts.push(
      all.length + some.length === 0
        ? `${listed(none)} ${verb(none)} from zero under no estimator`
        : `${listed(none)} under none`,
    );
  }
  if (all.length === 0 && some.length > 0) {
    parts[0] = `${listed(some)} ${verb(some)} from zero under some estimators only`;
  }
  return parts.join("; ");
}

/** The interval whose width is furthest from the classical one, by ratio. */
function widest(rows: readonly ComparedCoefficient[], estimators: readonly ComparedEstimator[]): string {
  let best: { term: string; estimator: number; ratio: number } | undefined;
  for (const { term, intervals } of rows) {
    for (const { estimator, widthRatio } of intervals) {
      if (!(widthRatio > 0)) continue;
      if (!best || Math.abs(Math.log(widthRatio)) > Math.abs(Math.log(best.ratio))) {
        best = { term, estimator, ratio: widthRatio };
      }
    }
  }
  if (!best || Math.abs(Math.log(best.ratio)) < 0.005)
    return "No interval differs in width from the classical one.";
  const { label } = estimators[best.estimator]!;
  return `The width changes most for ${best.term}: ${best.ratio.toFixed(2)} times the classical one under ${label}.`;
}
