import type { Regression } from "../../estimate/index.js";
import { columnOf } from "../../numeric/index.js";
import { notComputed } from "../parts/laws.js";
import { unitResiduals } from "../parts/residuals.js";
import { standardised } from "../parts/standardise.js";
import type { Test } from "../test.js";
import { squaresOn } from "./on-columns.js";

/**
 * White (1980): squared residuals on the terms, their squares and cross products; dependent columns count once. With more
 * columns than half the periods the cross products are left out, and with still too many the test is not computed. The
 * terms are standardised first, which spans the same space.
 */
export function white(m: Regression, crossProducts?: boolean): Test {
  const e = unitResiduals(m, "spread");
  const terms: Float64Array[] = [];
  for (let j = 0; j < m.k; j++) {
    const column = standardised(columnOf(m.X, j));
    if (column) terms.push(column);
  }
  const n = terms.length;
  const full = n + (n * (n + 1)) / 2;
  const crossed = crossProducts ?? full <= m.T / 2;
  const name = "White";
  if (n === 0) return notComputed(name, "the terms do not vary");
  if (!crossed && 2 * n > m.T / 2)
    return notComputed(name, `${2 * n} columns are too many for ${m.T} periods`);
  const columns = [...terms];
  for (let i = 0; i < n; i++)
    for (let j = i; j < n; j++)
      if (i === j || crossed) columns.push(terms[i]!.map((x, t) => x * terms[j]![t]!));
  const test = squaresOn(e, columns, { LM: name, F: "White F" }).LM;
  return crossed || test.note ? test : { ...test, note: "squares only, no cross products" };
}

/** White's test in its short form: squared residuals on the fitted values and their squares. */
export function whiteOnFitted(m: Regression): Test {
  const e = unitResiduals(m, "spread");
  const name = "White, on fitted values";
  const fitted = standardised(m.y.map((y, t) => y - m.residuals[t]!));
  if (!fitted) return notComputed(name, "the fitted values do not vary");
  return squaresOn(e, [fitted, fitted.map((x) => x * x)], { LM: name, F: name }).LM;
}
