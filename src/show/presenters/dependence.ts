import type { Dependence } from "../../diagnose/index.js";
import { type Part, tablePart } from "../card/card.js";
import { byLagChart, correlogramChart, periodogramChart } from "../chart/correlogram.js";
import { chartPart } from "../chart/part.js";
import type { Showing } from "../showing.js";
import { htmlTable } from "../table/html.js";
import { counted, figure, statistic, type TableModel, words } from "../table/model.js";
import { levelText } from "../text/figures.js";
import { name } from "../text/legible.js";
import { diagnosticCard } from "./diagnostic.js";
import { testsPart, testsTable } from "./tests.js";

function correlations(m: Dependence): TableModel {
  const group = `${levelText(m.level)} band without dependence`;
  const scale = { decimals: 3, exponent: 0 };
  return {
    title: `Autocorrelations of the residuals of ${name(m.outcome)}`,
    columns: [
      { key: "lag", title: "Lag", align: "right" },
      { key: "acf", title: "Autocorrelation", align: "decimal" },
      { key: "pacf", title: "Partial", align: "decimal" },
      { key: "low", title: "from", group, align: "decimal" },
      { key: "high", title: "to", group, align: "decimal" },
    ],
    rows: m.acf.map((point, i) => [
      counted(point.lag),
      figure(point.value, scale),
      figure(m.pacf[i]?.value ?? Number.NaN, scale),
      figure(point.low, scale),
      figure(point.high, scale),
    ]),
  };
}

function inflation(m: Dependence): TableModel {
  return {
    title: "Variance under the residuals' autoregression over variance under independence",
    columns: [
      { key: "term", title: "Term" },
      { key: "factor", title: "Variance ratio", align: "decimal" },
    ],
    rows: m.inflation.factors.map(({ term, factor }) => [words(term), statistic(factor, 3)]),
  };
}

function folded(table: TableModel, title: string): Part[] {
  return table.rows.length === 0 ? [] : [tablePart(table, htmlTable(table), title)];
}

// The tests that the finding may rest on, and those that most readers look for; the rest are folded away.
const leading = ["Breusch–Godfrey F", "Robust LM", "Durbin–Watson", "Ljung–Box"];

const title = (m: Dependence) => `Tests of independence of the residuals of ${name(m.outcome)}`;

/** Whether the past still shows in the residuals: tests, correlograms, and what it does to the variances. */
export const dependenceShowing: Showing<Dependence> = {
  card: async (m) => {
    const first = m.tests.filter((test) => leading.includes(test.name) || test === m.decisive);
    const others = m.tests.filter((test) => !first.includes(test));
    return diagnosticCard(m, "dependence of the residuals on their past", [
      await chartPart(correlogramChart(m)),
      testsPart(title(m), first.length > 0 ? first : m.tests),
      ...(first.length > 0 && others.length > 0 ? [testsPart(title(m), others, "Other tests")] : []),
      ...folded(correlations(m), "Autocorrelations lag by lag"),
      ...folded(inflation(m), "What the dependence does to the variance of each coefficient"),
    ]);
  },
  tables: { tests: (m) => testsTable(title(m), m.tests), correlations, inflation },
  charts: { correlogram: correlogramChart, "by lag": byLagChart, periodogram: periodogramChart },
};
