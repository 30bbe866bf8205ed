import type { Cointegration } from "../../diagnose/index.js";
import { factsPart, tablePart } from "../card/card.js";
import { colours, lineGrey } from "../chart/colours.js";
import { chartPart } from "../chart/part.js";
import { type ChartSource, tooltip } from "../chart/spec.js";
import type { Showing } from "../showing.js";
import { htmlTable } from "../table/html.js";
import { statistic, type TableModel, words } from "../table/model.js";
import { count, number, significant } from "../text/figures.js";
import { name } from "../text/legible.js";
import { listed } from "../text/listed.js";
import { testsPart, testsTable } from "./tests.js";

function relation(m: Cointegration): TableModel {
  return {
    title: `Relation of ${name(m.columns[0]!)} to the others`,
    columns: [
      { key: "term", title: "Term" },
      { key: "estimate", title: "Estimate", align: "decimal" },
    ],
    rows: m.relation.map(({ term, estimate }) => [words(term), statistic(estimate)]),
  };
}

function distanceChart(m: Cointegration): ChartSource {
  const points = m.residuals;
  const [first, last] = [points[0]?.label ?? "", points.at(-1)?.label ?? ""];
  // The axis has no dates of its own: its ends are named in the title, every point in its tooltip.
  const x = {
    field: "t",
    type: "quantitative",
    title: `${first} to ${last}`,
    scale: { zero: false, nice: false },
    axis: { labels: false, ticks: false, grid: false },
  };
  const y = { field: "v", type: "quantitative", title: "distance from the relation" };
  return {
    title: `How far ${name(m.columns[0]!)} is from the relation`,
    description: `Distance of ${name(m.columns[0]!)} from its relation with ${listed(m.columns.slice(1))}, ${first} to ${last}; first autocorrelation ${number(m.acf[0] ?? Number.NaN, 3)}.`,
    body: {
      width: 600,
      height: 160,
      data: {
        values: points.map(({ at, label, value }) => ({ t: at, v: value, p: label, f: number(value) })),
      },
      layer: [
        { mark: { type: "rule", color: lineGrey }, encoding: { y: { datum: 0, type: "quantitative" } } },
        { mark: { type: "line", color: colours.blue }, encoding: { x, y } },
        {
          mark: { type: "point", opacity: 0, size: 50 },
          encoding: { x, y, tooltip: tooltip({ p: "period", f: "distance" }) },
        },
      ],
    },
  };
}

/** Whether series keep to a relation. */
export const cointegrationShowing: Showing<Cointegration> = {
  card: async (m) => {
    const table = relation(m);
    return {
      subject: m.columns[0]!,
      headline: [`relation with ${listed(m.columns.slice(1))}`, `${count(m.T)} periods`],
      finding: m.finding,
      remarks: m.remarks,
      parts: [
        testsPart("Test of the residuals for a unit root", m.tests),
        tablePart(table, htmlTable(table)),
        await chartPart(distanceChart(m)),
        factsPart(
          [["1, 5 and 10%", m.critical.map((value) => significant(value, 4)).join(", ")]],
          "Critical values",
        ),
      ],
    };
  },
  tables: { relation, tests: (m) => testsTable("Test of the residuals for a unit root", m.tests) },
  charts: { distance: distanceChart },
};
