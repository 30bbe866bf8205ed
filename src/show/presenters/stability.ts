import { suggestion } from "../../data/index.js";
import type { Stability } from "../../diagnose/index.js";
import { InputError } from "../../numeric/index.js";
import { tablePart } from "../card/card.js";
import { chartPart } from "../chart/part.js";
import { pathPanel } from "../chart/paths.js";
import type { ChartSource } from "../chart/spec.js";
import type { Showing } from "../showing.js";
import { htmlTable } from "../table/html.js";
import { type Column, counted, rounded, statistic, type TableModel, words } from "../table/model.js";
import { count, levelText, number } from "../text/figures.js";
import { name } from "../text/legible.js";
import { listed } from "../text/listed.js";
import { diagnosticCard, timesOf } from "./diagnostic.js";
import { testsPart, testsTable } from "./tests.js";

function waldChart(m: Stability): ChartSource {
  const top = m.path.reduce<Stability["path"][number] | undefined>(
    (a, b) => (a && a.wald >= b.wald ? a : b),
    undefined,
  );
  const breaks = m.breaks.map(({ label }) => label);
  return {
    title: `Break statistic of ${name(m.outcome)} over the dates searched`,
    description: `Wald statistic of one break in the coefficients of ${name(m.outcome)} over ${count(m.path.length)} dates: largest ${number(top?.wald ?? Number.NaN)}; breaks found: ${breaks.length > 0 ? listed(breaks) : "none"}.`,
    ...(breaks.length > 0 ? { legend: "dashed: first period after a break" } : {}),
    body: pathPanel(timesOf(m).index, {
      points: m.path.map(({ at, wald }) => ({ at, value: wald })),
      title: "Wald statistic of a break",
      marks: m.breaks.map(({ at }) => at),
      zero: true,
      height: 160,
    }),
  };
}

function cusumChart(m: Stability): ChartSource {
  const { index, periods } = timesOf(m);
  const panel = (path: Stability["cusum"], title: string) =>
    pathPanel(index, {
      points: path.map(({ row, value, low, high }) => ({ at: periods[row]!, value, low, high })),
      title,
      zero: true,
      width: 280,
      height: 160,
    });
  const out = (path: Stability["cusum"]) =>
    path.some(({ value, low, high }) => value < low || value > high) ? "leaves" : "stays within";
  const panels = [panel(m.cusum, "CUSUM"), panel(m.cusumOfSquares, "CUSUM of squares")];
  return {
    title: `CUSUM of the recursive residuals of ${name(m.outcome)}`,
    description: `The CUSUM of the recursive residuals of ${name(m.outcome)} ${out(m.cusum)} its ${levelText(m.level)} band; the CUSUM of squares ${out(m.cusumOfSquares)} its band.`,
    legend: `grey: ${levelText(m.level)} band of stable coefficients`,
    body: { hconcat: panels, spacing: 24 },
    panels,
  };
}

const most = 9;

function recursiveChart(m: Stability, of?: string): ChartSource {
  const terms = m.recursive.map(({ term }) => term);
  if (of !== undefined && !terms.includes(of)) {
    throw new InputError(`chart: the fit has no term ${JSON.stringify(of)}.${suggestion(of, terms)}`);
  }
  const chosen =
    of === undefined ? m.recursive.slice(0, most) : m.recursive.filter(({ term }) => term === of);
  const panels = chosen.map(({ term, points }) =>
    pathPanel(timesOf(m).index, {
      points: points.map(({ period, estimate, low, high }) => ({ at: period, value: estimate, low, high })),
      title: null,
      heading: name(term, 40),
      ...(of === undefined ? { width: 280, height: 120 } : {}),
    }),
  );
  return {
    title: `Coefficients of ${name(m.outcome)} from the periods up to each`,
    description: `Coefficients of ${name(m.outcome)} estimated from the periods up to each, with ${levelText(m.level)} intervals: ${listed(chosen.map(({ term }) => term))}.`,
    legend: `grey: ${levelText(m.level)} interval from the periods so far`,
    body: { concat: panels, columns: 2 },
    panels,
  };
}

function regimesTable(m: Stability): TableModel {
  return {
    title: "Coefficients between the breaks",
    columns: [
      { key: "term", title: "Term" },
      ...m.regimes.map(({ label }): Column => ({ key: label, title: label, align: "decimal" })),
    ],
    rows: m.terms.map((term, j) => [
      words(term),
      ...m.regimes.map(({ coefficients }) => rounded(coefficients[j]!)),
    ]),
  };
}

function numbersTable(m: Stability): TableModel {
  return {
    title: "Number of breaks",
    columns: [
      { key: "breaks", title: "Breaks", align: "right" },
      { key: "rss", title: "Residual sum of squares", align: "decimal" },
      { key: "bic", title: "BIC", align: "decimal" },
    ],
    rows: m.numberOfBreaks.criteria.map(({ breaks, rss, bic }) => [
      counted(breaks),
      statistic(rss, 5),
      statistic(bic, 6),
    ]),
  };
}

const title = (m: Stability) => `Tests of stable coefficients of ${name(m.outcome)}`;

/** Whether the coefficients are the same throughout. */
export const stabilityShowing: Showing<Stability> = {
  card: async (m) => {
    const [regimes, numbers] = [regimesTable(m), numbersTable(m)];
    return diagnosticCard(m, "stability of the coefficients", [
      ...(m.path.length > 0 ? [await chartPart(waldChart(m))] : []),
      testsPart(title(m), m.tests),
      ...(m.regimes.length > 1 ? [tablePart(regimes, htmlTable(regimes), regimes.title)] : []),
      ...(m.cusum.length > 0 ? [await chartPart(cusumChart(m), "CUSUM and CUSUM of squares")] : []),
      ...(m.recursive.length > 0
        ? [await chartPart(recursiveChart(m), "Coefficients from the periods up to each")]
        : []),
      ...(numbers.rows.length > 0 ? [tablePart(numbers, htmlTable(numbers), numbers.title)] : []),
    ]);
  },
  tables: { tests: (m) => testsTable(title(m), m.tests), regimes: regimesTable, breaks: numbersTable },
  charts: { breaks: waldChart, cusum: cusumChart, recursive: recursiveChart },
};
