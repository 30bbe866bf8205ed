import type { Regression } from "../../estimate/index.js";
import { columnOf } from "../../numeric/index.js";
import { auxiliaryRegression } from "../parts/auxiliary-regression.js";
import { fisherTest, notComputed } from "../parts/laws.js";
import { addColumns, basisColumns } from "../parts/projection.js";
import { unitResiduals } from "../parts/residuals.js";
import { robustWald } from "../parts/robust-wald.js";
import { standardised } from "../parts/standardise.js";
import type { Test } from "../test.js";

function powersOfFitted(m: Regression, highest: number): Float64Array[] | undefined {
  const fitted = standardised(m.y.map((y, t) => y - m.residuals[t]!));
  if (!fitted) return undefined;
  return Array.from({ length: highest - 1 }, (_, i) => fitted.map((x) => x ** (i + 2)));
}

/**
 * Ramsey's (1969) RESET: powers 2 .. `highest` of the standardised fitted values added to the terms; F against
 * F(q, T − k − q). Assumes independent errors of even variance.
 */
export function reset(m: Regression, highest: number): Test {
  const name = "RESET";
  const e = unitResiduals(m, "form");
  const powers = powersOfFitted(m, highest);
  if (!powers) return notComputed(name, "the fitted values do not vary");
  const { rss, rank } = addColumns(e, basisColumns(m.Q), powers, 1e-7);
  const q = rank[powers.length]!;
  const rest = m.T - m.k - q;
  const note = highest === 2 ? "squares of the fitted values" : `powers 2 to ${highest} of the fitted values`;
  if (q === 0) return notComputed(name, "the powers of the fitted values are combinations of the terms");
  if (rest < 1) return notComputed(name, `T − k = ${m.T - m.k} leaves no degrees of freedom`);
  const left = rss[powers.length]!;
  return fisherTest(name, (rss[0]! - left) / q / (left / rest), q, rest, { note });
}

/** The same question by a Wald test that allows for dependent and uneven errors. */
export function robustReset(m: Regression, highest: number): Test {
  const name = "RESET, robust";
  const powers = powersOfFitted(m, highest);
  if (!powers) return notComputed(name, "the fitted values do not vary");
  const basis = basisColumns(m.Q);
  const { directions } = addColumns(unitResiduals(m, "form"), basis, powers, 1e-7);
  if (directions.length === 0)
    return notComputed(name, "the powers of the fitted values are combinations of the terms");
  if (m.T <= m.k + directions.length + 1) return notComputed(name, "too few periods");
  const columns = Array.from({ length: m.k }, (_, j) => columnOf(m.X, j));
  const scale = Math.sqrt(m.T);
  const added = directions.map((d) => d.map((x) => x * scale));
  const auxiliary = auxiliaryRegression(
    m.y,
    [...columns, ...added],
    [...m.terms, ...added.map((_, i) => `power ${i + 2} of the fitted values`)],
    m.periods,
    { interceptAt: m.interceptAt },
  );
  return robustWald(
    name,
    auxiliary,
    added.map((_, i) => m.k + i),
  );
}
