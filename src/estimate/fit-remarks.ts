import type { Remark } from "../data/index.js";
import type { Fit } from "./fit.js";

/** Condition number beyond which the terms are said to nearly depend on one another (a triangle whose pivots fall below 1e-7). */
const nearDependence = 1e7;

/** What the reader of a fit's card must know: of the design, of the arithmetic, of the covariance estimator. */
export function fitRemarks(m: Fit): readonly Remark[] {
  const remarks: Remark[] = [...m.design.remarks];
  if (m.perfect) {
    remarks.push({
      severity: "caution",
      text: "the fit is perfect to rounding: standard errors, intervals and tests of the residuals mean nothing",
    });
  } else remarks.push(...m.covariance.remarks);
  const { condition } = m.regression;
  if (condition > nearDependence) {
    remarks.push({
      severity: "caution",
      text: `the terms nearly depend on one another (condition number ${condition.toExponential(1)})`,
    });
  }
  return remarks;
}
