import type { Integration, SeriesIntegration } from "../../diagnose/index.js";
import { factsPart, tablePart } from "../card/card.js";
import type { Showing } from "../showing.js";
import { htmlTable } from "../table/html.js";
import {
  type Cell,
  counted,
  probability,
  sentence,
  statistic,
  type TableModel,
  words,
} from "../table/model.js";
import { significant } from "../text/figures.js";
import { listed } from "../text/listed.js";

/** The tests of all series: one row per series and test. */
function testsTable(m: Integration): TableModel {
  return {
    title: "Tests of integration",
    columns: [
      { key: "series", title: "Series" },
      { key: "test", title: "Test" },
      { key: "lags", title: "Lags", align: "right" },
      { key: "statistic", title: "Statistic", align: "decimal" },
      { key: "law", title: "Law", wrap: 6 },
      { key: "p", title: "p", align: "decimal" },
      { key: "note", title: "Note", wrap: 8 },
    ],
    rows: m.series.flatMap(({ column, tests }) =>
      tests.map((test): Cell[] => [
        words(column),
        sentence(test.name),
        test.lags === undefined ? { text: "", value: null } : counted(test.lags),
        statistic(test.statistic),
        sentence(test.distribution),
        probability(test.p),
        { text: test.note ?? "" },
      ]),
    ),
  };
}

function readings(m: Integration): TableModel {
  return {
    title: "What the tests come to",
    columns: [
      { key: "series", title: "Series" },
      { key: "periods", title: "Periods", align: "right" },
      { key: "reading", title: "Reads as" },
    ],
    rows: m.series.map(({ column, T, reading }) => [words(column), counted(T), words(reading)]),
  };
}

function critical({ column, critical: at }: SeriesIntegration): readonly [string, string] {
  const said = (values: readonly number[]) => values.map((value) => significant(value, 4)).join(", ");
  return [column, `about a level ${said(at.constant)}; about a trend ${said(at.trend)}`];
}

/** Whether series are stationary or integrated. */
export const integrationShowing: Showing<Integration> = {
  card: (m) => {
    const [table, summary] = [testsTable(m), readings(m)];
    return {
      subject: listed(m.series.map(({ column }) => column)),
      headline: ["order of integration"],
      finding: m.finding,
      remarks: m.remarks,
      parts: [
        ...(m.series.length > 1 ? [tablePart(summary, htmlTable(summary))] : []),
        tablePart(table, htmlTable(table), m.series.length > 1 ? "Tests, series by series" : undefined),
        factsPart(m.series.map(critical), "Critical values of ADF at 1, 5 and 10%"),
      ],
    };
  },
  tables: { tests: testsTable, readings },
};
