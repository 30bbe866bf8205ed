import type { Dependence } from "../../diagnose/index.js";
import { count, levelText, number, pValue } from "../text/figures.js";
import { name } from "../text/legible.js";
import { colours, dashes, lineGrey } from "./colours.js";
import { seriesEncoding } from "./series.js";
import { type ChartBody, type ChartSource, tooltip } from "./spec.js";

type Point = Dependence["acf"][number];

const figure = (x: number) => number(x, 3);

function panel(points: readonly Point[], title: string, domain: readonly number[]): ChartBody {
  const values = points.map(({ lag, value, low, high, bartlett, uneven }) => ({
    l: lag,
    v: value,
    a: low,
    b: high,
    u: uneven,
    w: uneven === undefined ? undefined : -uneven,
    t: bartlett,
    o: value < low || value > high,
    f: figure(value),
    g: `${figure(low)} to ${figure(high)}`,
  }));
  const x = {
    field: "l",
    type: "quantitative",
    title: "lag",
    axis: { tickMinStep: 1, grid: false, format: "d" },
  };
  const y = (field: string) => ({ field, type: "quantitative", title, scale: { domain } });
  const dense = points.length > 40;
  const robust = points.some((point) => point.uneven !== undefined);
  const dashed = (field: string) => ({
    mark: { type: "line", color: colours.vermillion, strokeWidth: 1.2, strokeDash: dashes[1] },
    encoding: { x, y: y(field) },
  });
  return {
    width: 290,
    height: 170,
    data: { values },
    layer: [
      {
        mark: { type: "area", color: lineGrey, opacity: 0.2 },
        encoding: { x, y: y("a"), y2: { field: "b" } },
      },
      ...(robust ? [dashed("u"), dashed("w")] : []),
      { mark: { type: "rule", color: lineGrey }, encoding: { y: { datum: 0, type: "quantitative" } } },
      {
        mark: { type: "rule", color: colours.blue, strokeWidth: dense ? 1.2 : 2 },
        encoding: { x, y: y("v"), y2: { datum: 0 } },
      },
      {
        mark: { type: "point", color: colours.blue, size: dense ? 12 : 40, strokeWidth: dense ? 1 : 1.5 },
        encoding: {
          x,
          y: y("v"),
          fillOpacity: { condition: { test: "datum.o", value: 1 }, value: 0 },
          fill: { value: colours.blue },
          tooltip: tooltip({ l: "lag", f: "correlation", g: "band" }),
        },
      },
    ],
  };
}

/** Autocorrelations and partial autocorrelations of the residuals, side by side on one scale. */
export function correlogramChart(m: Dependence): ChartSource {
  const reach = [...m.acf, ...m.pacf].reduce(
    (most, p) => Math.max(most, Math.abs(p.value) || 0, Math.abs(p.high) || 0, p.uneven ?? 0),
    0,
  );
  const bound = Math.min(1, Math.ceil(11 * reach) / 10);
  const domain = [-bound, bound];
  const outside = (points: readonly Point[]) => points.filter((p) => p.value < p.low || p.value > p.high);
  const said = (points: readonly Point[]) =>
    outside(points)
      .slice(0, 6)
      .map((p) => `${p.lag} (${figure(p.value)})`)
      .join(", ");
  const of = (points: readonly Point[], what: string) => {
    const out = outside(points);
    if (out.length === 0)
      return `no ${what} of ${count(points.length)} lies outside its ${levelText(m.level)} band`;
    return `${count(out.length)} of ${count(points.length)} ${what}s lie outside their ${levelText(m.level)} band, at lags ${said(points)}${out.length > 6 ? ", ..." : ""}`;
  };
  const panels = [panel(m.acf, "autocorrelation", domain), panel(m.pacf, "partial autocorrelation", domain)];
  const uneven = m.acf.some((p) => p.uneven !== undefined) ? " · dashed: with uneven variance" : "";
  return {
    title: `Correlogram of the residuals of ${name(m.outcome)}`,
    description: `Correlogram of the residuals of ${name(m.outcome)}: ${of(m.acf, "autocorrelation")}; ${of(m.pacf, "partial autocorrelation")}.`,
    body: { hconcat: panels, spacing: 24 },
    panels,
    legend: `grey: ${levelText(m.level)} band without dependence${uneven} · filled: outside it`,
  };
}

/** The p-values of the lag tests, lag by lag, on one chart. */
export function byLagChart(m: Dependence): ChartSource {
  const tests = [
    ["breuschGodfrey", "Breusch–Godfrey, lags up to"],
    ["robust", "robust LM, lags up to"],
    ["ljungBox", "Ljung–Box, lags up to"],
    ["alone", "Cumby–Huizinga, lag alone"],
  ] as const;
  const values = tests.flatMap(([key, label]) =>
    m.byLag
      .filter((row) => Number.isFinite(row[key]))
      .map((row) => ({ l: row.lag, p: row[key], s: label, f: pValue(row[key]) })),
  );
  const x = {
    field: "l",
    type: "quantitative",
    title: "lag",
    axis: { tickMinStep: 1, grid: false, format: "d" },
  };
  const series = seriesEncoding(
    "s",
    tests.map(([, label]) => label),
  );
  const y = { field: "p", type: "quantitative", title: "p", scale: { domain: [0, 1] } };
  return {
    title: `p-values of the lag tests on the residuals of ${name(m.outcome)}`,
    description: `p-values of the lag tests on the residuals of ${name(m.outcome)}, lags 1 to ${m.byLag.length}; at lag 1: ${tests
      .map(([key, label]) => `${label.split(",")[0]} ${pValue(m.byLag[0]?.[key] ?? Number.NaN)}`)
      .join(", ")}.`,
    body: {
      width: 520,
      height: 220,
      layer: [
        {
          data: { values: [{ p: 1 - m.level }] },
          mark: { type: "rule", strokeDash: [4, 4], color: lineGrey },
          encoding: { y: { field: "p", type: "quantitative" } },
        },
        { data: { values }, mark: "line", encoding: { x, y, ...series.line } },
        {
          data: { values },
          mark: { type: "point", filled: true, size: 45 },
          encoding: { x, y, ...series.point, tooltip: tooltip({ s: "test", l: "lag", f: "p" }) },
        },
      ],
    },
  };
}

/** The cumulative periodogram of the residuals with its band. */
export function periodogramChart(m: Dependence): ChartSource {
  const { path, band, test } = m.periodogram;
  const values = path.map(({ frequency, share }) => ({
    x: frequency,
    y: share,
    a: Math.max(0, 2 * frequency - band),
    b: Math.min(1, 2 * frequency + band),
    f: figure(frequency),
    g: figure(share),
  }));
  const x = { field: "x", type: "quantitative", title: "cycles per period", axis: { grid: false } };
  return {
    title: `Cumulative periodogram of the residuals of ${name(m.outcome)}`,
    description: `Cumulative periodogram of the residuals of ${name(m.outcome)}: largest distance from the diagonal ${figure(test.statistic)}, p ${pValue(test.p)}${path.length === 0 && test.note ? ` (${test.note})` : ""}.`,
    body: {
      width: 420,
      height: 240,
      data: { values },
      layer: [
        {
          mark: { type: "area", color: lineGrey, opacity: 0.2 },
          encoding: { x, y: { field: "a", type: "quantitative" }, y2: { field: "b" } },
        },
        {
          mark: { type: "line", color: colours.blue, interpolate: "step-after" },
          encoding: { x, y: { field: "y", type: "quantitative", title: "share of variance up to there" } },
        },
        {
          mark: { type: "point", opacity: 0, size: 60 },
          encoding: {
            x,
            y: { field: "y", type: "quantitative" },
            tooltip: tooltip({ f: "frequency", g: "share" }),
          },
        },
      ],
    },
  };
}
