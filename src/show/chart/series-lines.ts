import { periodLabel, type TimeIndex } from "../../data/index.js";
import { count, number } from "../text/figures.js";
import { name } from "../text/legible.js";
import { colours } from "./colours.js";
import { timeLine } from "./gaps.js";
import { type ChartSource, tooltip } from "./spec.js";
import { timeScale } from "./time-axis.js";

/** One series over the rows of an index. */
export interface Series {
  readonly name: string;
  readonly values: ArrayLike<number>;
}

// Points of all series together up to which each can be pointed at; beyond, hidden points would outweigh the picture.
const mostPoints = 3000;

/** Several series below each other on one time axis, which zooms and moves for all at once. */
export function seriesChart(title: string, index: TimeIndex, series: readonly Series[]): ChartSource {
  const time = timeScale(index.step);
  const { ordinals } = index;
  const values: object[] = [];
  const bins = Math.max(120, Math.min(500, Math.floor(2000 / series.length)));
  const all = ordinals.length * series.length;
  const hover = all <= mostPoints;
  let thinned = 0;
  for (const [n, one] of series.entries()) {
    const few = timeLine(ordinals, one.values, bins);
    if (few.thinned) thinned = Math.max(thinned, few.from);
    for (let i = 0; i < few.x.length; i++) {
      const [ordinal, value] = [few.x[i]!, few.y[i]!];
      values.push({
        t: time.at(ordinal),
        v: Number.isFinite(value) ? drawn(value, few.thinned) : null,
        s: name(one.name),
        n,
        ...(hover ? { p: periodLabel(index, ordinal), f: number(value) } : {}),
      });
    }
  }
  const said = series.map(({ name: label, values: all }) => `${name(label)} ${rangeOf(all)}`);
  const less =
    thinned > 0
      ? ` Drawn from first, lowest, highest and last of ${bins} stretches of ${count(thinned)} periods.`
      : "";
  const height = series.length <= 2 ? 150 : series.length <= 5 ? 90 : 60;
  const x = time.encoding("t");
  return {
    title,
    description: `${title}: ${said.join("; ")}.${less}`,
    ...(thinned > 0 ? { legend: `aggregated from ${count(thinned)} periods` } : {}),
    body: {
      data: { values },
      // Sorted by number: a list of names would end up in an expression.
      facet: {
        row: {
          field: "s",
          type: "nominal",
          sort: { field: "n", op: "min" },
          title: null,
          header: { labelOrient: "top", labelAnchor: "start", labelPadding: 2 },
        },
      },
      spacing: 8,
      resolve: { scale: { y: "independent" } },
      spec: {
        width: 620,
        height,
        layer: [
          {
            params: [{ name: "zoom", select: { type: "interval", encodings: ["x"] }, bind: "scales" }],
            mark: { type: "line", color: colours.blue, strokeWidth: 1.3 },
            encoding: {
              x,
              y: {
                field: "v",
                type: "quantitative",
                title: null,
                scale: { zero: false },
                axis: { tickCount: 4 },
              },
            },
          },
          ...(hover
            ? [
                {
                  mark: { type: "point", size: 30, opacity: 0 },
                  encoding: {
                    x,
                    y: { field: "v", type: "quantitative", title: null, scale: { zero: false } },
                    tooltip: tooltip({ p: "period", s: "series", f: "value" }),
                  },
                },
              ]
            : []),
        ],
      },
    },
  };
}

// Of a picture of aggregates six figures are more than the eye has, and each figure more weighs on the notebook.
function drawn(value: number, thinned: boolean): number {
  return thinned ? Number(value.toPrecision(6)) : value;
}

function rangeOf(values: ArrayLike<number>): string {
  let [low, high, missing] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, 0];
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    if (Number.isNaN(value)) missing++;
    else {
      low = Math.min(low, value);
      high = Math.max(high, value);
    }
  }
  if (missing === values.length) return "missing throughout";
  const holes = missing > 0 ? `, ${count(missing)} missing` : "";
  return `from ${number(low)} to ${number(high)}${holes}`;
}
