import { type Look, spanText } from "../../data/index.js";
import { tablePart } from "../card/card.js";
import { lookChart } from "../chart/look.js";
import { chartPart } from "../chart/part.js";
import type { Showing } from "../showing.js";
import { htmlTable } from "../table/html.js";
import { blank, type Column, counted, figure, type TableModel } from "../table/model.js";
import { count } from "../text/figures.js";
import { name } from "../text/legible.js";
import { listed } from "../text/listed.js";

const three = { decimals: 3, exponent: 0 };

/** Autocorrelations lag by lag, one column a series. */
function autocorrelations(look: Look): TableModel {
  const lags = look.series[0]!.autocorrelation.map(({ lag }) => lag);
  return {
    title: "Autocorrelations",
    columns: [
      { key: "lag", title: "Lag", align: "right" },
      ...look.series.map((one): Column => ({ key: one.name, title: name(one.name), align: "decimal" })),
    ],
    rows: lags.map((lag, i) => [
      counted(lag),
      ...look.series.map(({ autocorrelation }) => {
        const at = autocorrelation[i];
        return at ? figure(at.value, three) : blank;
      }),
    ]),
  };
}

/** Correlations of each series with the first at lags back and forth. */
function crossCorrelations(look: Look): TableModel {
  const others = look.series.filter(({ withFirst }) => withFirst !== undefined);
  return {
    title: `Correlations with ${name(look.series[0]!.name)} so many periods earlier`,
    columns: [
      { key: "lag", title: "Lag", align: "right" },
      ...others.map((one): Column => ({ key: one.name, title: name(one.name), align: "decimal" })),
    ],
    rows: (others[0]?.withFirst ?? []).map(({ lag }, i) => [
      { text: String(lag).replace("-", "−"), value: lag },
      ...others.map(({ withFirst }) => figure(withFirst![i]!.value, three)),
    ]),
  };
}

/** Series on one time axis with their correlations. */
export const lookShowing: Showing<Look> = {
  card: async (look) => {
    const own = autocorrelations(look);
    const cross = crossCorrelations(look);
    return {
      subject: listed(look.series.map((one) => one.name)),
      headline: [spanText(look.index), `${count(look.index.ordinals.length)} rows`],
      remarks: look.remarks,
      parts: [
        await chartPart(lookChart(look)),
        tablePart(own, htmlTable(own), "Autocorrelations lag by lag"),
        ...(cross.rows.length > 0 ? [tablePart(cross, htmlTable(cross), cross.title)] : []),
      ],
      fingerprint: look.fingerprint,
    };
  },
  tables: { autocorrelations, "cross-correlations": crossCorrelations },
  charts: { series: lookChart },
};
