import { lineGrey, seriesColours, textGrey } from "./colours.js";

/** A whole Vega-Lite specification; not by Vega-Lite's own type, which every session would have to read as it starts. */
export type VegaLite = Readonly<Record<string, unknown>>;

/** A chart before it is dressed: a Vega-Lite specification without schema, background and configuration. */
export type ChartBody = Record<string, unknown>;

/** What a chart maker gives. */
export interface ChartSource {
  /** `Autocorrelations of the residuals of riders`. */
  readonly title: string;
  /** What the chart shows, in words and figures, for whoever cannot see it. */
  readonly description: string;
  readonly body: ChartBody;
  /** What marks and shades stand for, in a line: below the picture on a card, above it in Vega-Lite. */
  readonly legend?: string;
  /** The same picture in pieces that a card may put below each other in a narrow window. */
  readonly panels?: readonly ChartBody[];
}

/**
 * JupyterLab 4.6 draws Vega-Lite with its own copy of version 5.6 and knows that MIME type only up to 5. Nothing newer than
 * 5.6 may stand in a specification, whatever version draws the SVG here.
 */
export const vegaLiteType = "application/vnd.vegalite.v5+json";
const schema = "https://vega.github.io/schema/vega-lite/v5.json";

const grid = "rgba(128,128,128,0.22)";

// One dress for light and dark pages: nothing behind the picture, mid-greys that read on both.
const config = {
  // With ARIA texts on, Vega-Lite writes every title of an axis into an expression, in version 5.6 without escaping it.
  // The words for who cannot see a chart are its description, written by hand.
  aria: false,
  background: "transparent",
  font: "system-ui, sans-serif",
  view: { stroke: null, continuousWidth: 600, continuousHeight: 200 },
  range: { category: seriesColours },
  axis: {
    labelColor: textGrey,
    titleColor: textGrey,
    tickColor: lineGrey,
    domainColor: lineGrey,
    gridColor: grid,
    labelFontSize: 12,
    titleFontSize: 12,
    titleFontWeight: "normal",
    titleLimit: 400,
    labelLimit: 180,
  },
  // What is drawn upwards is said above the axis, where it reads without a turned head.
  axisY: {
    titleAngle: 0,
    titleAlign: "left",
    titleAnchor: "start",
    titleBaseline: "bottom",
    titleX: -30,
    titleY: -8,
  },
  legend: {
    labelColor: textGrey,
    titleColor: textGrey,
    labelFontSize: 12,
    titleFontSize: 12,
    titleFontWeight: "normal",
    labelLimit: 260,
    symbolStrokeWidth: 1.5,
  },
  header: {
    labelColor: textGrey,
    titleColor: textGrey,
    labelFontSize: 12,
    titleFontSize: 12,
    labelLimit: 260,
  },
  title: { color: textGrey, subtitleColor: textGrey, anchor: "start", fontSize: 13, fontWeight: "normal" },
  text: { color: textGrey },
  rule: { color: lineGrey },
  line: { strokeWidth: 1.5 },
  point: { opacity: 1 },
};

/** A complete Vega-Lite specification, for JupyterLab. */
export function dressed({ body, description, legend }: ChartSource): VegaLite {
  return complete({
    description,
    ...(legend === undefined ? {} : { title: { text: legend, fontSize: 12 } }),
    ...body,
  });
}

/** A chart's pictures for a card, which says the legend in text of its own. */
export function pictures({ body, panels }: ChartSource): VegaLite[] {
  return (panels ?? [body]).map(complete);
}

// By way of JSON, so that what is drawn here is what JupyterLab is sent: no undefined fields, null for NaN.
function complete(body: ChartBody): VegaLite {
  const spec = { $schema: schema, background: "transparent", ...body, config };
  return JSON.parse(JSON.stringify(spec)) as VegaLite;
}

/**
 * A heading above one picture of several: the only title, beside headers and legends, that may be a name from the data.
 * Titles of axes and tooltips end up in expressions.
 */
export function panelHeading(text: string | undefined): object {
  return text === undefined ? {} : { title: { text, fontSize: 12 } };
}

/**
 * A tooltip of several values. The titles are constants of this room: Vega-Lite writes them into expressions, where a
 * name from the data has no business. Names from the data are values of fields.
 */
export function tooltip(fields: Readonly<Record<string, string>>): object[] {
  return Object.entries(fields).map(([field, title]) => ({ field, title, type: "nominal" }));
}
