import type { Regression } from "../../estimate/index.js";
import { auxiliaryRegression } from "../parts/auxiliary-regression.js";
import { notComputed } from "../parts/laws.js";
import { addColumns, basisColumns } from "../parts/projection.js";
import { unitResiduals } from "../parts/residuals.js";
import { robustWald } from "../parts/robust-wald.js";
import type { Test } from "../test.js";

/** Squared residuals against the terms, as Koenker's test, with a Wald test that dependence leaves alone. */
export function robustSpread(m: Regression): Test {
  const name = "Spread against the terms, robust to dependence";
  const e = unitResiduals(m, "spread");
  const constant = new Float64Array(m.T).fill(1);
  const { directions } = addColumns(e, [constant.map((x) => x / Math.sqrt(m.T))], basisColumns(m.Q));
  if (directions.length === 0) return notComputed(name, "the terms do not vary");
  if (m.T < directions.length + 3) return notComputed(name, "too few periods");
  const columns = [constant, ...directions.map((d) => d.map((x) => x * Math.sqrt(m.T)))];
  const squares = e.map((x) => x * x);
  const labels = columns.map((_, j) => (j === 0 ? "intercept" : `direction ${j}`));
  const auxiliary = auxiliaryRegression(squares, columns, labels, m.periods, { interceptAt: 0 });
  return robustWald(
    name,
    auxiliary,
    directions.map((_, j) => j + 1),
  );
}
