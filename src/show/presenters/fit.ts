import { periodLabel } from "../../data/index.js";
import type { Fit } from "../../estimate/index.js";
import { type Fact, factsPart, type Part, tablePart } from "../card/card.js";
import { effectAxis, scale } from "../card/effect-axis.js";
import { axisHead, drawInterval } from "../card/interval.js";
import { coefficientsChart } from "../chart/coefficients.js";
import { seriesChart } from "../chart/series-lines.js";
import type { Showing } from "../showing.js";
import { estimateCells, estimateColumns } from "../table/estimates.js";
import { htmlTable } from "../table/html.js";
import type { TableModel } from "../table/model.js";
import { count, levelText, number, significant } from "../text/figures.js";
import { name } from "../text/legible.js";
import { listed } from "../text/listed.js";
import { estimatorFacts } from "./estimator-facts.js";

function coefficientTable(m: Fit): TableModel {
  return {
    title: `Coefficients of ${name(m.outcome)}, ${estimatorLabel(m)}`,
    columns: estimateColumns(m.level),
    rows: m.coefficients.map(estimateCells),
  };
}

/** The estimator with its choices spelled out; its bare name where it could not be computed. */
function estimatorLabel(m: Fit): string {
  return m.perfect ? m.estimator.label : m.covariance.label;
}

function coefficientPart(m: Fit): Part {
  const table = coefficientTable(m);
  const { axis, title, factors } = effectAxis(m.coefficients, m.regression);
  const cells = m.coefficients.map((row, j) => drawInterval(axis, scale(row, factors[j]!)));
  return tablePart(
    table,
    htmlTable(table, { at: 1, drawn: { head: axisHead(axis, title), cells, width: "9em" } }),
  );
}

/** Which intervals exclude zero: a sentence about these data. */
function finding(m: Fit): string {
  if (m.perfect) return `The terms give ${name(m.outcome)} to rounding.`;
  const rows = m.coefficients.filter((_, j) => j !== m.regression.interceptAt);
  const away = rows.filter(({ low, high }) => low > 0 || high < 0).map(({ term }) => term);
  const across = rows.filter(({ low, high }) => low <= 0 && high >= 0).map(({ term }) => term);
  const level = levelText(m.level);
  if (rows.length === 0) return `No terms beside the intercept.`;
  if (away.length + across.length === 0) return `No ${level} interval could be computed.`;
  if (away.length === 0) {
    return across.length === 1
      ? `The ${level} interval of ${listed(across)} holds zero.`
      : `The ${level} intervals of all ${count(across.length)} terms hold zero.`;
  }
  const some = `The ${level} interval${away.length > 1 ? "s" : ""} of ${listed(away)} exclude${away.length > 1 ? "" : "s"} zero`;
  if (across.length === 0) return `${some}.`;
  return `${some}; ${across.length > 1 ? "those" : "that"} of ${listed(across)} ${across.length > 1 ? "do" : "does"} not.`;
}

function details(m: Fit): Part {
  const { value, about } = m.rSquared;
  const filled = m.design.filled;
  const left = m.design.left;
  const facts: Fact[] = [
    ["Estimator", estimatorLabel(m)],
    [
      "Errors",
      m.specification.errors === "iid"
        ? "independent, of one variance (least squares)"
        : m.specification.errors,
    ],
    ["Residual standard deviation", `${number(Math.sqrt(m.s2))} with ${count(m.T - m.k)} degrees of freedom`],
    [`R² about ${about === "mean" ? "the mean" : "zero"}`, significant(value)],
    ["Log-likelihood", `${significant(m.logLikelihood, 6)} (normal errors)`],
    ["AIC, BIC", `${significant(m.aic, 6)}, ${significant(m.bic, 6)}`],
    ["Condition number", number(m.regression.condition, 3)],
    ...(filled > 0 ? [["Periods on filled values", count(filled)] as const] : []),
    ...(left.length > 0 ? [["Periods left out", leftText(m)] as const] : []),
    ...(m.perfect ? [] : estimatorFacts(m.covariance.details)),
    ...m.table.provenance.map((line, i): Fact => [`Data, step ${i + 1}`, line]),
  ];
  return factsPart(facts, "About this fit");
}

function leftText(m: Fit): string {
  const { left, index } = m.design;
  const byReason = new Map<string, number[]>();
  for (const { ordinal, reason } of left) byReason.set(reason, [...(byReason.get(reason) ?? []), ordinal]);
  return [...byReason]
    .map(([reason, ordinals]) => {
      const said = ordinals.slice(0, 3).map((ordinal) => periodLabel(index, ordinal));
      const more = ordinals.length > 3 ? `, and ${count(ordinals.length - 3)} more` : "";
      return `${said.join(", ")}${more} (${reason})`;
    })
    .join("; ");
}

/** A fit: its coefficients under the estimator that is on, each with its interval drawn. */
export const fitShowing: Showing<Fit> = {
  card: (m) => ({
    subject: m.outcome,
    headline: [m.span, `${count(m.T)} periods`, `${count(m.k)} coefficients`, estimatorLabel(m)],
    finding: finding(m),
    remarks: m.remarks,
    parts: [coefficientPart(m), details(m)],
    fingerprint: m.fingerprint,
  }),
  tables: { coefficients: coefficientTable },
  charts: {
    coefficients: (m) =>
      coefficientsChart(
        `Coefficients of ${name(m.outcome)}`,
        m.coefficients,
        effectAxis(m.coefficients, m.regression),
        m.level,
      ),
    residuals: (m) =>
      seriesChart(`Residuals of ${name(m.outcome)}`, rowsOf(m), [{ name: "residuals", values: m.residuals }]),
    fitted: (m) =>
      seriesChart(`${name(m.outcome)}, fitted values and residuals`, rowsOf(m), [
        { name: m.outcome, values: m.regression.y },
        { name: "fitted", values: m.fitted },
        { name: "residuals", values: m.residuals },
      ]),
  },
};

function rowsOf(m: Fit) {
  return { ...m.design.index, ordinals: m.regression.periods };
}
