import type { Covariances } from "../../covariance/index.js";
import { type Axis, axisFor } from "../card/axis.js";
import { type Part, tablePart } from "../card/card.js";
import { axisHead, drawInterval, drawSpan } from "../card/interval.js";
import { covariancesChart } from "../chart/covariances.js";
import type { Showing } from "../showing.js";
import { htmlTable } from "../table/html.js";
import {
  type Cell,
  type Column,
  figure,
  probability,
  sentence,
  statistic,
  type TableModel,
  words,
} from "../table/model.js";
import { plainTable } from "../table/plain.js";
import { count, levelText, number, pValue, scaleFor, significant } from "../text/figures.js";
import { type Html, html } from "../text/html.js";
import { name } from "../text/legible.js";
import { aboutFacts, aboutPrint } from "./about.js";

type Row = Covariances["coefficients"][number];

const judged = (row: Row) => row.intervals.filter(({ conclusion }) => conclusion !== "none");

/** Lowest and highest of some figures, as one text: `0.95 to 1.94`, or the one figure if they read alike. */
function range(values: readonly number[], write: (x: number) => string): string {
  if (values.length === 0) return "–";
  const [low, high] = [write(Math.min(...values)), write(Math.max(...values))];
  return low === high ? low : `${low} to ${high}`;
}

function held({ apart, judged: all }: Row): string {
  if (all === 0) return "no interval";
  if (apart === all) return `under all ${count(all)}`;
  return apart === 0 ? `under none of ${count(all)}` : `under ${count(apart)} of ${count(all)}`;
}

/** One row per coefficient: what the choice of estimator does to it. */
function summary(m: Covariances): TableModel {
  return {
    title: `Coefficients of ${name(m.outcome)} under ${m.estimators.length} estimators`,
    columns: [
      { key: "term", title: "Term" },
      { key: "estimate", title: "Estimate", align: "decimal" },
      { key: "ratio", title: "SE × classical", align: "right" },
      { key: "p", title: "p", align: "right" },
      { key: "holds", title: "Differs from zero" },
    ],
    rows: m.coefficients.map((row): Cell[] => {
      const intervals = judged(row);
      const least = Math.min(...intervals.map(({ se }) => se));
      return [
        words(row.term),
        figure(row.estimate, scaleFor([row.estimate], Number.isFinite(least) ? least : row.classicalSe)),
        {
          text: range(
            intervals.map(({ ratio }) => ratio),
            (x) => significant(x, 3),
          ),
        },
        {
          text: range(
            intervals.map(({ p }) => p),
            pValue,
          ),
        },
        { text: held(row) },
      ];
    }),
  };
}

function estimatorColumns(m: Covariances): Column[] {
  const group = `${levelText(m.level)} interval`;
  return [
    { key: "estimator", title: "Estimator", wrap: 10 },
    { key: "se", title: "SE", align: "decimal" },
    { key: "ratio", title: "× classical", align: "decimal" },
    { key: "low", title: "from", group, align: "decimal" },
    { key: "high", title: "to", group, align: "decimal" },
    { key: "p", title: "p", align: "decimal" },
    { key: "law", title: "Law", wrap: 6 },
  ];
}

/** Every estimator's figures for one coefficient. */
function estimatorsTable(m: Covariances, row: Row): TableModel {
  // One scale for all, so that the figures can be compared down the column.
  const given = judged(row);
  const ends = given.flatMap(({ low, high }) => [low, high]);
  const scale = scaleFor([row.estimate, ...ends], Math.min(row.classicalSe, ...given.map(({ se }) => se)));
  return {
    title: `${name(row.term)}, estimate ${number(row.estimate)}`,
    columns: estimatorColumns(m),
    rows: row.intervals.map((interval): Cell[] => [
      sentence(m.estimators[interval.estimator]!.label),
      figure(interval.se, scale),
      statistic(interval.ratio, 3),
      figure(interval.low, scale),
      figure(interval.high, scale),
      probability(interval.p),
      sentence(interval.law),
    ]),
  };
}

/** All figures in one table: one row per coefficient and estimator. */
function everything(m: Covariances): TableModel {
  const parts = m.coefficients.map((row) => ({ row, table: estimatorsTable(m, row) }));
  return {
    title: `Coefficients of ${name(m.outcome)} under every estimator`,
    columns: [{ key: "term", title: "Term" }, ...estimatorColumns(m)],
    rows: parts.flatMap(({ row, table }) => table.rows.map((cells) => [words(row.term), ...cells])),
  };
}

// In classical standard errors all coefficients stand on one axis, whatever their units. One that is very far from zero, as
// intercepts often are, ends in an arrow instead of pressing the others together.
function commonAxis(m: Covariances): Axis {
  const ends = m.coefficients.flatMap((row) =>
    judged(row).map(({ low, high }) => ({ low: low / row.classicalSe, high: high / row.classicalSe })),
  );
  const reach = ends.map(({ low, high }) => Math.max(Math.abs(low), Math.abs(high))).sort((a, b) => a - b);
  const most = Math.max(8, 3 * (reach[Math.floor(reach.length / 2)] ?? 0));
  const clip = (x: number) => Math.max(-most, Math.min(most, x));
  return axisFor(ends.map(({ low, high }) => ({ low: clip(low), high: clip(high) })));
}

function drawnSummary(m: Covariances): Html[] {
  const axis = commonAxis(m);
  return m.coefficients.map((row) => {
    const intervals = judged(row);
    if (intervals.length === 0) return html``;
    const unit = row.classicalSe;
    return drawSpan(axis, {
      estimate: row.estimate / unit,
      outer: [
        Math.min(...intervals.map((i) => i.low)) / unit,
        Math.max(...intervals.map((i) => i.high)) / unit,
      ],
      inner: [
        Math.max(...intervals.map((i) => i.low)) / unit,
        Math.min(...intervals.map((i) => i.high)) / unit,
      ],
      filled: row.holds === "all" ? "full" : row.holds === "some" ? "half" : "none",
    });
  });
}

function summaryPart(m: Covariances): Part {
  const table = summary(m);
  const head = axisHead(commonAxis(m), "In classical standard errors");
  const drawn = { head, cells: drawnSummary(m), width: "9em" };
  const legend = html`<div style="font-size:0.85em;opacity:0.8">thick: narrowest interval · thin: widest interval · filled: differs from zero under all, half: under some, ring: under none</div>`;
  const part = tablePart(table, htmlTable(table, { at: 1, drawn }));
  return { ...part, html: html`${part.html}${legend}` };
}

// Pages stay light: beyond so many coefficients, the most sensitive first, the details are in the plain text and the record.
const most = 12;

function restPart(m: Covariances): Part {
  const rest = m.coefficients.length - most;
  const call = html`<code>covariances(m, { terms: [...] })</code>`;
  return {
    html: html`<div style="opacity:0.8">Estimator by estimator for the other ${rest} coefficients: ${call}, or <code>tableOf(covariances(m), "intervals")</code></div>`,
    plain: "",
  };
}

function coefficientPart(m: Covariances, row: Row, open: boolean, drawnToo: boolean): Part {
  const table = estimatorsTable(m, row);
  if (!drawnToo) return { html: html``, plain: `${table.title}\n${plainTable(table)}` };
  const axis = axisFor(judged(row), 2);
  const cells = row.intervals.map(({ low, high }) =>
    drawInterval(axis, { estimate: row.estimate, low, high }, { height: "1.75em" }),
  );
  // What room there is goes to the names: an interval needs less than a long name on five lines.
  const drawn = { head: axisHead(axis, ""), cells, width: "10em", stretch: false };
  const title = `${name(row.term)}: differs from zero ${held(row)}, SE ${range(
    judged(row).map(({ ratio }) => ratio),
    (x) => significant(x, 3),
  )} times the classical`;
  return { ...tablePart(table, htmlTable(table, { at: 1, drawn }), title), open };
}

/** Those that a reader wants to see at once: whose conclusion changes, at most three; failing that the first. */
function opened(m: Covariances): ReadonlySet<Row> {
  const changing = m.coefficients.filter(({ holds }) => holds === "some").slice(0, 3);
  return new Set(changing.length > 0 ? changing : m.coefficients.slice(0, 1));
}

/** What each covariance estimator does to every conclusion. */
export const covariancesShowing: Showing<Covariances> = {
  card: (m) => {
    const open = opened(m);
    return {
      subject: m.outcome,
      headline: [`${count(m.estimators.length)} covariance estimators`, ...aboutFacts(m.about)],
      finding: m.finding,
      remarks: m.remarks,
      parts: [
        summaryPart(m),
        ...m.coefficients.map((row, i) => coefficientPart(m, row, open.has(row), i < most)),
        ...(m.coefficients.length > most ? [restPart(m)] : []),
      ],
      ...aboutPrint(m.about),
    };
  },
  tables: { summary, intervals: everything },
  charts: { intervals: covariancesChart },
};
