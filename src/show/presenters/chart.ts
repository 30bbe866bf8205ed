import { type MimeBundle, presentWith } from "../../data/index.js";
import type { Chart } from "../chart/chart.js";
import { vegaLiteType } from "../chart/spec.js";
import { recordOf, recordType } from "../record.js";

/**
 * A chart's bundle. JupyterLab would take HTML before Vega-Lite, so there is none: it draws the specification, others the
 * SVG, a terminal the words.
 */
export function showCharts(): void {
  presentWith<Chart>("chart", async (chart): Promise<MimeBundle> => {
    return {
      "text/plain": `${chart.title}\n\n${chart.description}`,
      [vegaLiteType]: chart.spec,
      "image/svg+xml": await chart.toSvg(),
      [recordType]: recordOf(chart),
    };
  });
}
