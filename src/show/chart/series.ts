import { dashes, seriesColours } from "./colours.js";

const shapes = ["circle", "square", "triangle-up", "diamond", "cross", "triangle-down"] as const;

/** Encodings that tell series apart by colour and something else. */
export interface SeriesEncoding {
  /** For a layer of lines: colour and line pattern. */
  readonly line: Record<string, object>;
  /** For a layer of points: colour and shape. */
  readonly point: Record<string, object>;
}

/**
 * How the series named by a field are drawn. Domain and range are spelled out in every channel: only then do both versions
 * of Vega-Lite (the one here and JupyterLab's) put colour, pattern and shape into one legend.
 */
export function seriesEncoding(field: string, names: readonly string[]): SeriesEncoding {
  const channel = (range: readonly unknown[]) => ({
    field,
    type: "nominal",
    title: null,
    scale: { domain: names, range: names.map((_, i) => range[i % range.length]) },
  });
  const color = channel(seriesColours);
  return {
    line: { color, strokeDash: channel(dashes) },
    point: { color, shape: channel(shapes) },
  };
}
