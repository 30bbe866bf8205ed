import { type Part, picturePart } from "../card/card.js";
import { html } from "../text/html.js";
import { drawSvg } from "./draw.js";
import { image } from "./image.js";
import { type ChartSource, pictures } from "./spec.js";

// Below this a picture of 600 px would have letters too small to read: it scrolls instead.
const readable = 440;

/** A chart as a part of a card: pictures with their legend on a page, the description in plain text. */
export async function chartPart(source: ChartSource, folded?: string): Promise<Part> {
  const drawn: string[] = [];
  for (const spec of pictures(source)) drawn.push(await drawSvg(spec));
  const images = drawn.map((svg, i) =>
    image(
      svg,
      i === 0 ? source.description : `${source.title}, picture ${i + 1} of ${drawn.length}`,
      `min-width:${narrowest(svg)}px`,
    ),
  );
  const legend =
    source.legend !== undefined &&
    html`<div style="font-size:0.85em;opacity:0.8;margin:0 0 0.3em 0">${source.legend}</div>`;
  return picturePart(
    html`<div style="overflow-x:auto;max-width:100%">${images}</div>${legend}`,
    source.description,
    folded,
  );
}

function narrowest(svg: string): number {
  return Math.min(readable, Number(/\bwidth="([\d.]+)"/.exec(svg)?.[1] ?? readable));
}
