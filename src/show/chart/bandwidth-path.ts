import type { BandwidthPath } from "../../covariance/index.js";
import { number } from "../text/figures.js";
import { name } from "../text/legible.js";
import { colours, lineGrey } from "./colours.js";
import { seriesEncoding } from "./series.js";
import { type ChartSource, tooltip } from "./spec.js";
import { thin } from "./thin.js";

/** The standard error of a coefficient against the bandwidth, with each rule's choice and the classical one. */
export function bandwidthChart(m: BandwidthPath): ChartSource {
  const few = thin({ x: m.bandwidths, y: m.se });
  const values = Array.from(few.x, (bandwidth, i) => ({
    x: bandwidth,
    y: Number.isFinite(few.y[i]!) ? few.y[i] : null,
    f: number(few.y[i]!),
  }));
  const marks = m.marks.map(({ rule, bandwidth, se }) => ({
    x: bandwidth,
    y: Number.isFinite(se) ? se : null,
    s: rule,
    f: number(se),
    g: number(bandwidth),
  }));
  const series = seriesEncoding(
    "s",
    marks.map(({ s }) => s),
  );
  const x = { field: "x", type: "quantitative", title: "bandwidth", axis: { grid: false, tickCount: 8 } };
  const y = { field: "y", type: "quantitative", title: "standard error", scale: { zero: true } };
  const said = m.marks.map(({ rule, bandwidth, se }) => `${rule} ${number(bandwidth)} (SE ${number(se)})`);
  return {
    title: `Standard error of ${name(m.term)} by bandwidth`,
    description: `Standard error of ${name(m.term)} against the bandwidth, ${m.kernel} kernel; classical ${number(m.classicalSe)}. Rules: ${said.join("; ")}.`,
    legend: "dashed: classical standard error",
    body: {
      width: 480,
      height: 220,
      layer: [
        {
          data: { values: [{ y: m.classicalSe }] },
          mark: { type: "rule", strokeDash: [5, 3], color: lineGrey },
          encoding: { y },
        },
        { data: { values }, mark: { type: "line", color: colours.blue }, encoding: { x, y } },
        {
          data: { values },
          mark: { type: "point", opacity: 0, size: 40 },
          encoding: { x, y, tooltip: tooltip({ x: "bandwidth", f: "SE" }) },
        },
        {
          data: { values: marks },
          mark: { type: "point", filled: true, size: 90, opacity: 1 },
          encoding: { x, y, ...series.point, tooltip: tooltip({ s: "rule", g: "bandwidth", f: "SE" }) },
        },
      ],
    },
  };
}
