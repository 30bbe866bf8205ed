import type { Covariances } from "../../covariance/index.js";
import { suggestion } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { levelText, number, scaleFor, written } from "../text/figures.js";
import { name } from "../text/legible.js";
import { listed } from "../text/listed.js";
import { colours, lineGrey } from "./colours.js";
import { type ChartSource, tooltip } from "./spec.js";

const most = 8;

/** The estimators' short names; where two share one, with the choices spelled out. */
function shortNames(m: Covariances): string[] {
  const names = m.estimators.map((one) => one.name);
  return m.estimators.map((one) =>
    names.indexOf(one.name) === names.lastIndexOf(one.name) ? one.name : one.label,
  );
}

/** Every estimator's interval for each coefficient, one axis to a coefficient. */
export function covariancesChart(m: Covariances, of?: string): ChartSource {
  const terms = m.coefficients.map(({ term }) => term);
  if (of !== undefined && !terms.includes(of)) {
    throw new InputError(`chart: there is no coefficient ${JSON.stringify(of)}.${suggestion(of, terms)}`);
  }
  const chosen =
    of === undefined ? m.coefficients.slice(0, most) : m.coefficients.filter(({ term }) => term === of);
  const names = shortNames(m);
  const values = chosen.flatMap((row, n) => {
    const judged = row.intervals.filter(({ conclusion }) => conclusion !== "none");
    const low = Math.min(...judged.map((interval) => interval.low));
    const high = Math.max(...judged.map((interval) => interval.high));
    // Where zero is far off it would press all intervals together: it is left out, and its side is known by the figures.
    const near = Math.max(low, -high) <= 2 * (high - low);
    return judged.map((interval) => {
      const scale = scaleFor([row.estimate, interval.low, interval.high], interval.se);
      return {
        n,
        s: name(row.term),
        i: interval.estimator,
        m: names[interval.estimator]!,
        e: row.estimate,
        a: interval.low,
        b: interval.high,
        o: interval.conclusion !== "unclear",
        z: near ? 0 : null,
        f: `${written(interval.low, scale)} to ${written(interval.high, scale)}`,
        r: number(interval.ratio, 3),
      };
    });
  });
  const x = (field: string) => ({
    field,
    type: "quantitative",
    title: null,
    scale: { zero: false },
    axis: { tickCount: 5, grid: false },
  });
  const y = {
    field: "m",
    type: "nominal",
    title: null,
    sort: { field: "i", op: "min" },
    axis: { labelLimit: 260, grid: true },
  };
  const tips = tooltip({ s: "term", m: "estimator", f: "interval", r: "SE over classical" });
  const changing = chosen.filter(({ holds }) => holds === "some").map(({ term }) => term);
  const rest = terms.length - chosen.length;
  return {
    title: `Intervals of ${name(m.outcome)} under ${m.estimators.length} estimators`,
    description: `${levelText(m.level)} intervals of ${listed(chosen.map(({ term }) => term))} under ${m.estimators.length} estimators${rest > 0 && of === undefined ? ` (${rest} more coefficients not drawn)` : ""}. ${changing.length > 0 ? `Whether they differ from zero depends on the estimator for ${listed(changing)}` : "No conclusion depends on the estimator"}.`,
    legend: `line: ${levelText(m.level)} interval · filled: without zero · dashed: zero`,
    body: {
      data: { values },
      facet: {
        field: "s",
        type: "nominal",
        sort: { field: "n", op: "min" },
        title: null,
        header: { labelAnchor: "start", labelPadding: 4 },
      },
      columns: chosen.length > 1 ? 2 : 1,
      spacing: 14,
      resolve: { scale: { x: "independent" } },
      spec: {
        width: chosen.length > 1 ? 230 : 420,
        height: { step: 16 },
        layer: [
          {
            mark: { type: "rule", strokeDash: [4, 3], color: lineGrey },
            encoding: { x: x("z") },
          },
          {
            mark: { type: "rule", color: colours.blue, strokeWidth: 2 },
            encoding: { y, x: x("a"), x2: { field: "b" }, tooltip: tips },
          },
          {
            mark: { type: "point", color: colours.blue, fill: colours.blue, size: 40, strokeWidth: 1.5 },
            encoding: {
              y,
              x: x("e"),
              fillOpacity: { condition: { test: "datum.o", value: 1 }, value: 0 },
              tooltip: tips,
            },
          },
        ],
      },
    },
  };
}
