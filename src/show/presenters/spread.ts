import type { Spread } from "../../diagnose/index.js";
import { chartPart } from "../chart/part.js";
import { pathPanel } from "../chart/paths.js";
import { scatterPanel } from "../chart/scatter.js";
import type { ChartSource } from "../chart/spec.js";
import type { Showing } from "../showing.js";
import { number } from "../text/figures.js";
import { name } from "../text/legible.js";
import { diagnosticCard, timesOf } from "./diagnostic.js";
import { testsPart, testsTable } from "./tests.js";

function sizeChart(m: Spread): ChartSource {
  const over = (path: Spread["overTime"]) => {
    const sizes = path.map(({ size }) => size);
    return sizes.length === 0
      ? "none"
      : `between ${number(Math.min(...sizes), 3)} and ${number(Math.max(...sizes), 3)}`;
  };
  const title = "root mean square of the residuals";
  const panels = [
    pathPanel(timesOf(m).index, {
      points: m.overTime.map(({ at, size }) => ({ at, value: size })),
      title,
      mark: "points",
      zero: true,
      width: 300,
    }),
    scatterPanel({
      points: m.overFitted.map(({ at, size }) => ({ x: at, y: size })),
      xTitle: "fitted value",
      yTitle: title,
      size: 45,
      zero: true,
      width: 230,
      height: 180,
    }),
  ];
  return {
    title: `Size of the residuals of ${name(m.outcome)}`,
    description: `Root mean square of the residuals of ${name(m.outcome)} in stretches: over time ${over(m.overTime)}; over fitted values ${over(m.overFitted)}.`,
    body: { hconcat: panels, spacing: 24 },
    panels,
  };
}

const title = (m: Spread) => `Tests of an even spread of the residuals of ${name(m.outcome)}`;

/** Whether the residuals are of one size throughout. */
export const spreadShowing: Showing<Spread> = {
  card: async (m) =>
    diagnosticCard(m, "size of the residuals", [await chartPart(sizeChart(m)), testsPart(title(m), m.tests)]),
  tables: { tests: (m) => testsTable(title(m), m.tests) },
  charts: { size: sizeChart },
};
