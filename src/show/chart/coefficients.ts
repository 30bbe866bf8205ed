import { type EffectAxis, scale } from "../card/effect-axis.js";
import type { Estimate } from "../table/estimates.js";
import { levelText, scaleFor, written } from "../text/figures.js";
import { name } from "../text/legible.js";
import { colours, lineGrey } from "./colours.js";
import { type ChartSource, tooltip } from "./spec.js";

/** The coefficients of a fit with their intervals, below each other on one axis. */
export function coefficientsChart(
  title: string,
  rows: readonly Estimate[],
  { axis, title: unit, factors }: EffectAxis,
  level: number,
): ChartSource {
  const figures = rows.map((row) => {
    const s = scaleFor([row.estimate, row.low, row.high], row.se);
    return {
      estimate: written(row.estimate, s),
      interval: `${written(row.low, s)} to ${written(row.high, s)}`,
    };
  });
  const values = rows.map((row, n) => {
    const drawn = scale(row, factors[n]!);
    return {
      n,
      s: name(row.term),
      e: drawn.estimate,
      a: drawn.low,
      b: drawn.high,
      o: row.low > 0 || row.high < 0,
      f: figures[n]!.estimate,
      g: figures[n]!.interval,
    };
  });
  const x = (field: string) => ({
    field,
    type: "quantitative",
    title: unit.toLowerCase(),
    scale: { domain: [axis.from, axis.to], nice: false, zero: false },
  });
  const y = {
    field: "s",
    type: "nominal",
    title: null,
    sort: { field: "n", op: "min" },
    axis: { labelLimit: 240 },
  };
  const tips = tooltip({ s: "term", f: "estimate", g: "interval" });
  const said = rows.map((row, n) => `${name(row.term)} ${figures[n]!.estimate} (${figures[n]!.interval})`);
  return {
    title,
    description: `${title} with ${levelText(level)} intervals: ${said.join("; ")}.`,
    legend: `line: ${levelText(level)} interval · filled: without zero`,
    body: {
      width: 460,
      height: { step: 24 },
      data: { values },
      layer: [
        {
          mark: { type: "rule", strokeDash: [4, 3], color: lineGrey },
          encoding: { x: { datum: 0, type: "quantitative" } },
        },
        {
          mark: { type: "rule", color: colours.blue, strokeWidth: 2.5, clip: true },
          encoding: { y, x: x("a"), x2: { field: "b" }, tooltip: tips },
        },
        {
          mark: {
            type: "point",
            size: 70,
            strokeWidth: 2,
            color: colours.blue,
            fill: colours.blue,
            clip: true,
          },
          encoding: {
            y,
            x: x("e"),
            fillOpacity: { condition: { test: "datum.o", value: 1 }, value: 0 },
            tooltip: tips,
          },
        },
      ],
    },
  };
}
