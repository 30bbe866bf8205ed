import type { JointTest } from "../../covariance/index.js";
import { factsPart, tablePart } from "../card/card.js";
import type { Showing } from "../showing.js";
import { htmlTable } from "../table/html.js";
import { counted, probability, sentence, statistic, type TableModel } from "../table/model.js";
import { significant } from "../text/figures.js";
import { name } from "../text/legible.js";
import { aboutFacts, aboutPrint } from "./about.js";

function testTable(m: JointTest): TableModel {
  return {
    title: `Joint test of coefficients of ${name(m.outcome)}`,
    columns: [
      { key: "restrictions", title: "Restrictions", align: "right" },
      { key: "wald", title: "Wald", align: "decimal" },
      { key: "statistic", title: "Wald per restriction", align: "decimal" },
      { key: "law", title: "Law", wrap: 6 },
      { key: "p", title: "p", align: "decimal" },
    ],
    rows: [[counted(m.q), statistic(m.wald), statistic(m.statistic), sentence(m.law), probability(m.p)]],
  };
}

/** A test of several restrictions at once. */
export const jointTestShowing: Showing<JointTest> = {
  card: (m) => {
    const table = testTable(m);
    return {
      subject: m.outcome,
      headline: ["joint test", ...aboutFacts(m.about), m.estimator],
      finding: m.finding,
      remarks: m.remarks,
      parts: [
        factsPart(m.restrictions.map((text, i) => [i === 0 ? "Hypothesis" : "and", text] as const)),
        tablePart(table, htmlTable(table)),
        ...(m.error === undefined
          ? []
          : [factsPart([["Standard error of p, which is simulated", significant(m.error, 2)]])]),
      ],
      ...aboutPrint(m.about),
    };
  },
  tables: { test: testTable },
};
