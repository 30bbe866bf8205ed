import type { Remark } from "../../data/index.js";
import type { Regression } from "../../estimate/index.js";
import { missingPeriods } from "../parts/time.js";
import { counted, listed, pValue } from "../parts/words.js";
import type { InnovationSpread } from "./innovations.js";

/** What the reader of the card has to know about how the tests came about. */
export function dependenceRemarks(
  m: Regression,
  known: { constant: boolean; uneven: InnovationSpread; partial: Float64Array; dependent: boolean },
): Remark[] {
  const remarks: Remark[] = [];
  if (m.laggedOutcome)
    remarks.push({
      severity: "caution",
      text: "Lagged outcomes are among the terms: Durbin–Watson, von Neumann, Ljung–Box and Box–Pierce do not hold; read Breusch–Godfrey and Durbin's alternative.",
    });
  if (m.laggedOutcome && known.dependent)
    remarks.push({
      severity: "caution",
      text: "Dependent errors beside lagged outcomes bias the coefficients themselves, not only their standard errors.",
    });
  if (known.uneven.uneven) {
    const rejecting = known.uneven.tests
      .filter((test) => test.p < 0.05)
      .map((test) => `${test.name} ${pValue(test.p)}`);
    remarks.push({
      severity: "caution",
      text: `The variance of what the residuals' past leaves unexplained is uneven (${listed(rejecting)}): the finding rests on the robust LM test; the other tests assume an even variance.`,
    });
  }
  const missing = missingPeriods(m.periods);
  if (missing > 0)
    remarks.push({
      severity: "note",
      text: `${counted(missing, "period is", "periods are")} missing between the first and the last: lagged products are taken in time, over the pairs present, and lagged residuals that fall into a gap count as zero.`,
    });
  if (!known.constant)
    remarks.push({
      severity: "note",
      text: "No constant is among the terms: the mean of the residuals is taken off for the correlogram, Ljung–Box, Box–Pierce, runs and the cumulative periodogram.",
    });
  if (missing > 0 && known.partial.some(Number.isNaN))
    remarks.push({
      severity: "note",
      text: `Partial autocorrelations stop at lag ${known.partial.findIndex(Number.isNaN)}: across the gaps the autocorrelations beyond are not those of a stationary series.`,
    });
  return remarks;
}
