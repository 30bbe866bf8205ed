import type { Stretch } from "../../data/index.js";
import { colours } from "./colours.js";

const width = 600;
const height = 12;

/**
 * A strip over time as SVG: a solid bar where periods are there, an open frame where they are missing. It may be drawn
 * out to any width.
 */
export function missingStrip(first: number, last: number, missing: readonly Stretch[]): string {
  const span = last - first + 1;
  const px = (ordinal: number) => ((ordinal - first) / span) * width;
  // Stretches that would be less than a pixel wide are drawn as one, so that none is lost; close ones are drawn together.
  const frames: [number, number][] = [];
  for (const stretch of missing) {
    const from = px(stretch.first);
    const to = Math.max(px(stretch.last + 1), from + 1.5);
    const before = frames.at(-1);
    if (before && from - before[1] < 0.5) before[1] = to;
    else frames.push([from, to]);
  }
  let there = "";
  let gone = "";
  let at = 0;
  const bar = (from: number, to: number) =>
    `M${from.toFixed(2)} 2H${to.toFixed(2)}V${height - 2}H${from.toFixed(2)}Z`;
  for (const [from, to] of frames) {
    if (from > at) there += bar(at, from);
    gone += bar(from, to);
    at = Math.max(at, to);
  }
  if (at < width) there += bar(at, width);
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}" preserveAspectRatio="none">`,
    `<path d="${there}" fill="${colours.blue}" fill-opacity="0.6"/>`,
    `<path d="${gone}" fill="none" stroke="${colours.vermillion}" stroke-width="1.5" vector-effect="non-scaling-stroke"/>`,
    "</svg>",
  ].join("");
}
