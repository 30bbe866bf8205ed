import { periodLabel } from "../../data/index.js";
import type { Fitted } from "../subject.js";

/** What row `row` of a fit is called on a card: `2022-W14`. */
export function rowLabel(m: Fitted, row: number): string {
  return m.regression.periodName?.(row) ?? periodLabel(m.design.index, m.regression.periods[row]!);
}
