import type { Diagnostic, RowTimes } from "../../diagnose/index.js";
import type { Card, Part } from "../card/card.js";
import { count } from "../text/figures.js";

/** The card of a diagnostic: what it is about, its finding and remarks, and its parts. */
export function diagnosticCard(m: Diagnostic, what: string, parts: readonly Part[]): Card {
  return {
    subject: m.outcome,
    headline: [
      what,
      ...(m.span === undefined ? [] : [m.span]),
      `${count(m.T)} periods`,
      `${count(m.k)} ${m.k === 1 ? "coefficient" : "coefficients"}`,
    ],
    finding: m.finding,
    remarks: m.remarks,
    parts,
    ...(m.fingerprint === undefined ? {} : { fingerprint: m.fingerprint }),
  };
}

/** Where the rows stand in time; without a table they are numbered. */
export function timesOf(m: Diagnostic): RowTimes {
  return (
    m.time ?? {
      index: { step: { unit: "integer", count: 1 }, name: "row" },
      periods: Float64Array.from({ length: m.T }, (_, t) => t),
    }
  );
}
