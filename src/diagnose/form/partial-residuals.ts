import type { Regression } from "../../estimate/index.js";
import { columnOf } from "../../numeric/index.js";
import { takesMoreThan } from "../parts/distinct.js";

/** How the outcome moves with one term once the others are taken off. */
export interface PartialResiduals {
  readonly term: string;
  readonly slope: number;
  /** The term against ê + β̂ⱼxⱼ, thinned evenly in the order of the term where there are many. */
  readonly points: readonly { readonly x: number; readonly y: number }[];
  /** Means of `y` over up to ten stretches of the term with equal numbers of rows: bends show here. */
  readonly means: readonly { readonly x: number; readonly y: number; readonly n: number }[];
}

/** Partial residuals of every term that takes more than two values. */
export function partialResiduals(m: Regression, points = 400): PartialResiduals[] {
  const result: PartialResiduals[] = [];
  for (let j = 0; j < m.k; j++) {
    const x = columnOf(m.X, j);
    if (!takesMoreThan(2, x)) continue;
    const slope = m.coefficients[j]!;
    const rows = Array.from({ length: m.T }, (_, t) => t).sort((a, b) => x[a]! - x[b]! || a - b);
    const at = (t: number) => ({ x: x[t]!, y: m.residuals[t]! + slope * x[t]! });
    const every = Math.max(1, Math.ceil(m.T / points));
    const bins = Math.max(1, Math.min(10, Math.floor(m.T / 5)));
    result.push({
      term: m.terms[j]!,
      slope,
      points: rows.filter((_, i) => i % every === 0).map(at),
      means: Array.from({ length: bins }, (_, b) => {
        const stretch = rows.slice(Math.floor((b * m.T) / bins), Math.floor(((b + 1) * m.T) / bins)).map(at);
        const mean = (pick: (p: { x: number; y: number }) => number) =>
          stretch.reduce((sum, p) => sum + pick(p), 0) / stretch.length;
        return { x: mean((p) => p.x), y: mean((p) => p.y), n: stretch.length };
      }),
    });
  }
  return result;
}
