import type { Combination } from "../../covariance/index.js";
import { axisFor } from "../card/axis.js";
import { factsPart, tablePart } from "../card/card.js";
import { axisHead, drawInterval } from "../card/interval.js";
import type { Showing } from "../showing.js";
import { estimateCells, estimateColumns } from "../table/estimates.js";
import { htmlTable } from "../table/html.js";
import type { TableModel } from "../table/model.js";
import { number, significant } from "../text/figures.js";
import { name } from "../text/legible.js";
import { aboutFacts, aboutPrint } from "./about.js";

function combinationTable(m: Combination): TableModel {
  return {
    title: `Combination of coefficients of ${name(m.outcome)}`,
    columns: estimateColumns(m.level, "Combination"),
    rows: [estimateCells({ ...m, term: m.label })],
  };
}

/** A linear combination of coefficients with its interval. */
export const combinationShowing: Showing<Combination> = {
  card: (m) => {
    const table = combinationTable(m);
    const axis = axisFor([m]);
    const drawn = { head: axisHead(axis, ""), cells: [drawInterval(axis, m)], width: "11em" };
    return {
      subject: m.outcome,
      headline: ["combination of coefficients", ...aboutFacts(m.about), m.estimator],
      finding: m.finding,
      remarks: m.remarks,
      parts: [
        tablePart(table, htmlTable(table, { at: 1, drawn })),
        factsPart(
          [
            ...Object.entries(m.weights).map(([term, weight]) => [name(term), number(weight)] as const),
            ["t ratio", `${significant(m.statistic)}, judged by ${m.law || "no law"}`],
          ],
          "Weights and law",
        ),
      ],
      ...aboutPrint(m.about),
    };
  },
  tables: { combination: combinationTable },
};
