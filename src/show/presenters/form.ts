import { suggestion } from "../../data/index.js";
import type { Form } from "../../diagnose/index.js";
import { InputError } from "../../numeric/index.js";
import { chartPart } from "../chart/part.js";
import { scatterPanel } from "../chart/scatter.js";
import type { ChartSource } from "../chart/spec.js";
import type { Showing } from "../showing.js";
import { count, number } from "../text/figures.js";
import { name } from "../text/legible.js";
import { listed } from "../text/listed.js";
import { diagnosticCard } from "./diagnostic.js";
import { testsPart, testsTable } from "./tests.js";

function quantileChart(m: Form): ChartSource {
  const outside = m.quantiles.filter(({ found, low, high }) => found < low || found > high).length;
  return {
    title: `Quantiles of the residuals of ${name(m.outcome)} against the normal law`,
    description: `Quantiles of the residuals of ${name(m.outcome)} against the normal law: ${count(outside)} of ${count(m.quantiles.length)} points outside the pointwise band; skewness ${number(m.skewness, 3)}, kurtosis ${number(m.kurtosis, 3)}.`,
    legend: "grey: pointwise band under normal errors",
    body: scatterPanel({
      points: m.quantiles.map(({ expected, found, low, high }) => ({ x: expected, y: found, low, high })),
      straight: (x) => x,
      xTitle: "normal quantile",
      yTitle: "standardised residual",
      width: 320,
      height: 240,
    }),
  };
}

const most = 9;

function partialChart(m: Form, of?: string): ChartSource {
  const terms = m.partialResiduals.map(({ term }) => term);
  if (of !== undefined && !terms.includes(of)) {
    throw new InputError(
      `chart: there are no partial residuals of a term ${JSON.stringify(of)}.${suggestion(of, terms)}`,
    );
  }
  const chosen =
    of === undefined
      ? m.partialResiduals.slice(0, most)
      : m.partialResiduals.filter(({ term }) => term === of);
  const panels = chosen.map(({ term, slope, points, means }) =>
    scatterPanel({
      points,
      line: means,
      straight: (x) => slope * x,
      heading: name(term, 40),
      xTitle: "term",
      yTitle: "partial residual",
      ...(of === undefined ? { width: 210, height: 150, size: 8 } : { width: 420, height: 260 }),
    }),
  );
  const rest = terms.length - chosen.length;
  return {
    title: `Partial residuals of ${name(m.outcome)}`,
    description: `Partial residuals of ${name(m.outcome)} against ${listed(chosen.map(({ term }) => term))}, with means over stretches of each term${of === undefined && rest > 0 ? `; ${rest} more terms not drawn` : ""}.`,
    legend: "dashed: the coefficient · squares: means over stretches of the term",
    body: { concat: panels, columns: 3 },
    panels,
  };
}

const title = (m: Form) => `Tests of the shape of the regression of ${name(m.outcome)}`;

/** Whether the terms enter in the right shape, and what shape the residuals have. */
export const formShowing: Showing<Form> = {
  card: async (m) =>
    diagnosticCard(m, "shape of the regression", [
      ...(m.quantiles.length > 0 ? [await chartPart(quantileChart(m))] : []),
      testsPart(title(m), m.tests),
      ...(m.partialResiduals.length > 0
        ? [await chartPart(partialChart(m), "Partial residuals, term by term")]
        : []),
    ]),
  tables: { tests: (m) => testsTable(title(m), m.tests) },
  charts: { quantiles: quantileChart, "partial residuals": partialChart },
};
