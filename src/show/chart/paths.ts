import { periodLabel, type TimeIndex } from "../../data/index.js";
import { number } from "../text/figures.js";
import { colours, lineGrey } from "./colours.js";
import { type ChartBody, panelHeading, tooltip } from "./spec.js";
import { timeScale } from "./time-axis.js";

/** A point of a path over time, with its band where there is one. */
export interface PathPoint {
  /** On the time axis, in whole steps. */
  readonly at: number;
  readonly value: number;
  readonly low?: number;
  readonly high?: number;
}

/** A path over time, and how it is drawn. */
export interface Path {
  readonly points: readonly PathPoint[];
  /** What the values are: a constant of this room. */
  readonly title: string | null;
  /** A heading above the picture; may be a name from the data. */
  readonly heading?: string;
  /** Periods marked by upright lines. */
  readonly marks?: readonly number[];
  /** Whether zero is marked. Default false. */
  readonly zero?: boolean;
  readonly mark?: "line" | "points";
  readonly width?: number;
  readonly height?: number;
}

/** A path over time with its band (grey), marked periods (dashed) and zero. */
export function pathPanel(index: Omit<TimeIndex, "ordinals">, path: Path): ChartBody {
  const time = timeScale(index.step);
  const { points, title, marks = [] } = path;
  const values = points.map(({ at, value, low, high }) => ({
    t: time.at(at),
    v: Number.isFinite(value) ? value : null,
    a: low !== undefined && Number.isFinite(low) ? low : null,
    b: high !== undefined && Number.isFinite(high) ? high : null,
    p: periodLabel(index, at),
    f: number(value),
    g: low === undefined || high === undefined ? "" : `${number(low)} to ${number(high)}`,
  }));
  const banded = points.some((point) => point.low !== undefined);
  const width = path.width ?? 600;
  const x = time.encoding("t", width < 400 ? 4 : 8);
  const y = { field: "v", type: "quantitative", title, scale: { zero: path.zero ?? false } };
  const tips = tooltip({ p: "period", f: "value", ...(banded ? { g: "band" } : {}) });
  const lines = path.mark !== "points";
  return {
    width,
    height: path.height ?? 180,
    ...panelHeading(path.heading),
    data: { values },
    layer: [
      ...(banded
        ? [
            {
              mark: { type: "area", color: lineGrey, opacity: 0.22 },
              encoding: { x, y: { field: "a", type: "quantitative", title }, y2: { field: "b" } },
            },
          ]
        : []),
      ...(path.zero
        ? [{ mark: { type: "rule", color: lineGrey }, encoding: { y: { datum: 0, type: "quantitative" } } }]
        : []),
      ...(marks.length > 0
        ? [
            {
              data: { values: marks.map((at) => ({ t: time.at(at), p: periodLabel(index, at) })) },
              mark: { type: "rule", color: colours.vermillion, strokeDash: [5, 3], strokeWidth: 1.5 },
              encoding: { x, tooltip: tooltip({ p: "period" }) },
            },
          ]
        : []),
      ...(lines ? [{ mark: { type: "line", color: colours.blue }, encoding: { x, y } }] : []),
      {
        mark: lines
          ? { type: "point", opacity: 0, size: 50 }
          : { type: "point", color: colours.blue, filled: true, size: 45 },
        encoding: { x, y, tooltip: tips },
      },
    ],
  };
}
