import type { Regression } from "../../estimate/index.js";
import { chiSquaredTest, notComputed } from "../parts/laws.js";
import { basisColumns } from "../parts/projection.js";
import { unitResiduals } from "../parts/residuals.js";
import type { Test } from "../test.js";
import { squaresOn } from "./on-columns.js";

/**
 * Squared residuals against the terms: Koenker's (1981) T·R² and its F form, which do without normal errors, and Breusch
 * and Pagan's (1979) half explained sum of squares, which needs them.
 */
export function breuschPagan(m: Regression): { koenker: Test; koenkerF: Test; breuschPagan: Test } {
  const e = unitResiduals(m, "spread");
  const found = squaresOn(e, basisColumns(m.Q), { LM: "Koenker", F: "Koenker F" });
  const name = "Breusch–Pagan";
  return {
    koenker: found.LM,
    koenkerF: found.F,
    breuschPagan: Number.isNaN(found.explained)
      ? notComputed(name, found.LM.note ?? "")
      : chiSquaredTest(name, found.explained / 2, found.df, { note: "needs normal errors" }),
  };
}
