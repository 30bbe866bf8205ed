import type { Remark } from "../../data/index.js";
import type { Regression } from "../../estimate/index.js";
import { listed, pValue } from "../parts/words.js";
import type { SeveralBreaks } from "./several-breaks.js";
import type { SupWald } from "./sup-wald.js";

/** What the reader of the card has to know about the search for breaks. */
export function stabilityRemarks(
  m: Regression,
  one: SupWald,
  several: SeveralBreaks,
  level: number,
): Remark[] {
  const remarks: Remark[] = [];
  if (one.held.length > 0 && one.breaking.length > 0)
    remarks.push({
      severity: "note",
      text: `Held throughout, since the trimmed ends do not determine them or they were not asked for: ${listed(one.held.map((j) => m.terms[j]!))}.`,
    });
  const plain = one.plain.p;
  const robust = one.robust.p;
  if (plain < 1 - level && robust >= 1 - level)
    remarks.push({
      severity: "caution",
      text: `With even, independent errors and stationary terms the largest Wald statistic would have ${pValue(plain)}; allowing for these errors and terms it has ${pValue(robust)}.`,
    });
  if (several.byBic !== several.byTests)
    remarks.push({
      severity: "note",
      text: `BIC prefers ${several.byBic} ${several.byBic === 1 ? "break" : "breaks"}, the tests ${several.byTests}.`,
    });
  return remarks;
}
