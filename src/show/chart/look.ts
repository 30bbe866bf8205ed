import { type Look, periodLabel } from "../../data/index.js";
import { count, number } from "../text/figures.js";
import { name } from "../text/legible.js";
import { colours, lineGrey } from "./colours.js";
import { type ChartBody, type ChartSource, tooltip } from "./spec.js";
import { timeScale } from "./time-axis.js";

// Rows are sorted by number: a list of names would end up in an expression.
const rows = (labels: boolean) => ({
  field: "s",
  type: "nominal",
  sort: { field: "n", op: "min" },
  title: null,
  header: labels
    ? { labelOrient: "top", labelAnchor: "start", labelPadding: 2 }
    : // As high as the labels of the other columns, so that the rows stay level.
      { labelOrient: "top", labelAnchor: "start", labelPadding: 2, labelExpr: "' '" },
});

function lines(look: Look, height: number): ChartBody {
  const { index, series, periodsPerBin } = look;
  const time = timeScale(index.step);
  const values = series.flatMap((one, n) =>
    one.bins.map(({ first, last, low, mean, high }) => ({
      n,
      s: name(one.name),
      t: time.at(first),
      v: Number.isFinite(mean) ? mean : null,
      a: Number.isFinite(low) ? low : null,
      b: Number.isFinite(high) ? high : null,
      p:
        first === last
          ? periodLabel(index, first)
          : `${periodLabel(index, first)} to ${periodLabel(index, last)}`,
      f: number(mean),
    })),
  );
  const x = time.encoding("t", 5);
  const y = (field: string) => ({
    field,
    type: "quantitative",
    title: null,
    scale: { zero: false },
    axis: { tickCount: 3 },
  });
  return {
    data: { values },
    facet: { row: rows(true) },
    spacing: 10,
    resolve: { scale: { y: "independent" } },
    spec: {
      width: 380,
      height,
      layer: [
        ...(periodsPerBin > 1
          ? [
              {
                mark: { type: "area", color: colours.blue, opacity: 0.3 },
                encoding: { x, y: y("a"), y2: { field: "b" } },
              },
            ]
          : []),
        {
          params: [{ name: "zoom", select: { type: "interval", encodings: ["x"] }, bind: "scales" }],
          mark: { type: "line", color: colours.blue, strokeWidth: 1.2 },
          encoding: { x, y: y("v") },
        },
        {
          mark: { type: "point", size: 30, opacity: 0 },
          encoding: { x, y: y("v"), tooltip: tooltip({ p: "period", s: "series", f: "value" }) },
        },
      ],
    },
  };
}

interface Lag {
  readonly lag: number;
  readonly value: number;
}

function correlations(
  look: Look,
  title: string,
  of: (n: number) => readonly Lag[],
  height: number,
): ChartBody {
  const { band, series } = look;
  const values = series.flatMap((one, n): object[] => {
    const lags = of(n);
    const base = { n, s: name(one.name), a: -band, b: band };
    // A series without correlations keeps its row, so that the columns stay level.
    if (lags.length === 0) return [{ ...base, l: null, v: null, f: "" }];
    return lags.map(({ lag, value }) => ({ ...base, l: lag, v: value, f: number(value, 3) }));
  });
  const x = { field: "l", type: "quantitative", title, axis: { grid: false, tickCount: 4, format: "d" } };
  const y = (field: string) => ({
    field,
    type: "quantitative",
    title: null,
    scale: { domain: [-1, 1] },
    axis: { values: [-1, 0, 1] },
  });
  return {
    data: { values },
    facet: { row: rows(false) },
    spacing: 10,
    spec: {
      width: 150,
      height,
      layer: [
        {
          mark: { type: "area", color: lineGrey, opacity: 0.25 },
          encoding: { x, y: y("a"), y2: { field: "b" } },
        },
        {
          mark: { type: "rule", color: colours.blue, strokeWidth: 1.5 },
          encoding: {
            x,
            y: y("v"),
            y2: { datum: 0 },
            tooltip: tooltip({ s: "series", l: "lag", f: "correlation" }),
          },
        },
      ],
    },
  };
}

/** Series on one time axis, their autocorrelations, and the correlation of each with the first. */
export function lookChart(look: Look): ChartSource {
  const { series, periodsPerBin } = look;
  const height = series.length <= 3 ? 110 : series.length <= 8 ? 75 : 50;
  const first = name(series[0]!.name, 24);
  const panels = [
    lines(look, height),
    correlations(look, "lag, autocorrelation", (n) => series[n]!.autocorrelation, height),
    ...(series.length > 1
      ? [correlations(look, "lag behind the first", (n) => series[n]!.withFirst ?? [], height)]
      : []),
  ];
  const said = series.map(({ name: label, autocorrelation, withFirst }) => {
    const peak = withFirst?.reduce((a, b) => (Math.abs(b.value) > Math.abs(a.value) ? b : a));
    const leads = peak
      ? `, largest correlation with ${first} ${number(peak.value, 3)} at lag ${peak.lag}`
      : "";
    return `${name(label)}: first autocorrelation ${number(autocorrelation[0]?.value ?? Number.NaN, 3)}${leads}`;
  });
  return {
    title: "Series and their correlations",
    description: `${count(series.length)} series over time with their correlations. ${said.join("; ")}.`,
    legend: `grey: 95% band of independent series${periodsPerBin > 1 ? ` · each point the mean, the shade the range, of ${count(periodsPerBin)} periods` : ""}`,
    body: { hconcat: panels, spacing: 20 },
    panels,
  };
}
