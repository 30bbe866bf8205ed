import { slim } from "./slim.js";
import type { VegaLite } from "./spec.js";
import { textWidth } from "./text-metrics.js";

// Vega and Vega-Lite take 0.7 s to load: at the first chart, not at the start of the kernel.
let loading: Promise<readonly [typeof import("vega"), typeof import("vega-lite")]> | undefined;
// One drawing at a time: the numbers in clip-path identifiers start from 1 in each, so the same chart has the same bytes.
let queue: Promise<unknown> = Promise.resolve();

/** Draws a Vega-Lite specification to SVG. It can load nothing: its data are in it. */
export function drawSvg(spec: VegaLite): Promise<string> {
  loading ??= Promise.all([import("vega"), import("vega-lite")]);
  const drawn = queue.then(() => draw(spec));
  queue = drawn.catch(() => undefined);
  return drawn;
}

async function draw(spec: VegaLite): Promise<string> {
  const [vega, vegaLite] = await loading!;
  const logger = vega.logger(vega.Error);
  // A copy: Vega marks the rows of the data that it is given, and a chart's specification is to stay as it is.
  const compiled = vegaLite.compile(
    structuredClone(spec) as unknown as Parameters<typeof vegaLite.compile>[0],
    {
      logger,
    },
  );
  const loader = vega.loader();
  const refuse = () => Promise.reject(new Error("a chart loads nothing"));
  Object.assign(loader, { load: refuse, sanitize: refuse, http: refuse, file: refuse });
  vega.resetSVGDefIds();
  const { textMetrics } = vega as unknown as { textMetrics: TextMetrics };
  const estimate = textMetrics.width;
  textMetrics.width = (item, text) => measured(item, text);
  const view = new vega.View(vega.parse(compiled.spec), { renderer: "none", logger, loader });
  try {
    return slim(await view.toSVG());
  } finally {
    view.finalize();
    textMetrics.width = estimate;
  }
}

interface TextItem {
  readonly fontSize?: number;
  readonly limit?: number;
}

// What is used of Vega's text measures, which its types leave out.
interface TextMetrics {
  width: (item: TextItem, text: string | undefined) => number;
}

function measured(item: TextItem, text: string | undefined): number {
  const whole = textWidth(String(text ?? ""), item.fontSize ?? 11);
  return item.limit ? Math.min(item.limit, whole) : whole;
}
