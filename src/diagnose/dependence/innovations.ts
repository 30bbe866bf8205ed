import type { Regression } from "../../estimate/index.js";
import { holm } from "../parts/holm.js";
import { chiSquaredTest } from "../parts/laws.js";
import { addColumns, basisColumns } from "../parts/projection.js";
import { unitResiduals } from "../parts/residuals.js";
import { lagged } from "../parts/time.js";
import type { Test } from "../test.js";
import { arch } from "./arch.js";

/** Whether what the lagged residuals leave unexplained has a steady variance. */
export interface InnovationSpread {
  readonly tests: readonly Test[];
  /** Whether one of the tests rejects after Holm's adjustment. */
  readonly uneven: boolean;
}

/**
 * Koenker's and Engle's tests on the residuals cleared of their own past up to `lags`: on the raw residuals serial
 * correlation alone moves both. Decides which form of the tests for dependence to lean on.
 */
export function innovationSpread(m: Regression, lags: number, alpha: number): InnovationSpread {
  const e = unitResiduals(m, "dependence");
  const basis = basisColumns(m.Q);
  const past = Array.from({ length: lags }, (_, i) => lagged(e, m.periods, i + 1));
  const innovations = addColumns(e, basis, past).residuals;
  const total = innovations.reduce((sum, v) => sum + v * v, 0);
  const scaled = innovations.map((v) => v * Math.sqrt(m.T / total));
  const tests: Test[] = [arch(scaled, m.periods, Math.max(1, Math.min(lags, Math.floor(m.T / 10))))];
  const squares = scaled.map((v) => v * v);
  const constant = new Float64Array(m.T).fill(1 / Math.sqrt(m.T));
  const spread = addColumns(squares, [constant], basis);
  const df = spread.rank[m.k]!;
  if (df > 0 && spread.rss[0]! > 0 && m.T > df + 1) {
    const LM = m.T * (1 - spread.rss[m.k]! / spread.rss[0]!);
    tests.push(chiSquaredTest("Koenker", LM, df));
  }
  const named = tests.map((test) => ({
    ...test,
    note: [`own past up to lag ${lags} removed first`, test.note].filter(Boolean).join("; "),
  }));
  const uneven = holm(named.map((test) => test.p)).some((p) => p < alpha);
  return { tests: named, uneven };
}
