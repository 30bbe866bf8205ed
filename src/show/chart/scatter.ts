import { number } from "../text/figures.js";
import { colours, lineGrey } from "./colours.js";
import { type ChartBody, panelHeading, tooltip } from "./spec.js";

/** Points in a plane, with what goes through them. */
export interface Scatter {
  readonly points: readonly {
    readonly x: number;
    readonly y: number;
    readonly low?: number;
    readonly high?: number;
  }[];
  /** A line through these, such as means. */
  readonly line?: readonly { readonly x: number; readonly y: number }[];
  /** A straight line from end to end: value at x. */
  readonly straight?: (x: number) => number;
  /** Titles of the axes: constants of this room. */
  readonly xTitle: string;
  readonly yTitle: string;
  /** A heading above the picture; may be a name from the data. */
  readonly heading?: string;
  /** Whether the upright axis starts at zero. Default false. */
  readonly zero?: boolean;
  readonly size?: number;
  readonly width?: number;
  readonly height?: number;
}

/** A scatter of points with a band, a straight line and a line of means where there are any. */
export function scatterPanel(plot: Scatter): ChartBody {
  const { points, line = [], straight } = plot;
  const x = {
    field: "x",
    type: "quantitative",
    title: plot.xTitle,
    scale: { zero: false, nice: false },
    axis: { grid: false, tickCount: 5 },
  };
  const y = (field = "y") => ({
    field,
    type: "quantitative",
    title: plot.yTitle,
    scale: { zero: plot.zero ?? false },
  });
  const banded = points.some((point) => point.low !== undefined);
  const xs = points.map((point) => point.x);
  const ends =
    xs.length > 0 ? [xs.reduce((a, b) => Math.min(a, b)), xs.reduce((a, b) => Math.max(a, b))] : [];
  return {
    width: plot.width ?? 260,
    height: plot.height ?? 190,
    ...panelHeading(plot.heading),
    layer: [
      ...(banded
        ? [
            {
              data: { values: points.map(({ x: at, low, high }) => ({ x: at, a: low, b: high })) },
              mark: { type: "area", color: lineGrey, opacity: 0.22 },
              encoding: { x, y: y("a"), y2: { field: "b" } },
            },
          ]
        : []),
      ...(straight
        ? [
            {
              data: { values: ends.map((at) => ({ x: at, y: straight(at) })) },
              mark: { type: "line", color: lineGrey, strokeDash: [5, 3] },
              encoding: { x, y: y() },
            },
          ]
        : []),
      {
        data: { values: points.map((p) => ({ x: p.x, y: p.y, f: number(p.x), g: number(p.y) })) },
        mark: { type: "point", color: colours.blue, size: plot.size ?? 16, strokeWidth: 1 },
        encoding: { x, y: y(), tooltip: tooltip({ f: "x", g: "y" }) },
      },
      ...(line.length > 0
        ? [
            {
              data: { values: line },
              mark: {
                type: "line",
                color: colours.vermillion,
                strokeWidth: 2,
                point: { filled: true, color: colours.vermillion, size: 40, shape: "square" },
              },
              encoding: { x, y: y() },
            },
          ]
        : []),
    ],
  };
}
