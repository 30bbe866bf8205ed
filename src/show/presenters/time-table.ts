import { basename } from "node:path";
import {
  type Column,
  countFilled,
  countMissing,
  missingStretches,
  spanText,
  type TimeTable,
} from "../../data/index.js";
import { factsPart, type Part, tablePart } from "../card/card.js";
import { image } from "../chart/image.js";
import { seriesChart } from "../chart/series-lines.js";
import { spark } from "../chart/spark.js";
import type { Showing } from "../showing.js";
import { htmlTable } from "../table/html.js";
import { blank, type Cell, rounded, type TableModel, words } from "../table/model.js";
import { count, percent } from "../text/figures.js";
import { html } from "../text/html.js";
import { columnSummary } from "./column-summary.js";
import { requireColumn } from "./columns.js";
import { missingPart } from "./missing-map.js";
import { stretchesText } from "./stretches.js";

const most = 200;

function columnsTable(table: TimeTable): TableModel {
  const columns = table.columns.slice(0, most);
  const filled = columns.some((column) => countFilled(column) > 0);
  const missing = columns.some((column) => countMissing(column) > 0);
  return {
    title: "Columns",
    columns: [
      { key: "column", title: "Column" },
      { key: "kind", title: "Kind" },
      { key: "low", title: "Lowest", align: "right" },
      { key: "high", title: "Highest", align: "right" },
      { key: "missing", title: "Missing", align: "right" },
      ...(missing ? [{ key: "where", title: "Missing where", wrap: 8 }] : []),
      ...(filled ? [{ key: "filled", title: "Filled", align: "right" } as const] : []),
    ],
    rows: columns.map((column): Cell[] => {
      const { kind, low, high } = columnSummary(column);
      const gone = countMissing(column);
      return [
        words(column.name),
        words(kind),
        low === undefined ? blank : rounded(low, 5),
        high === undefined ? blank : rounded(high, 5),
        { text: gone === 0 ? "0" : `${count(gone)} (${percent(gone / table.T)})`, value: gone },
        ...(missing ? [words(stretchesText(table.index, missingStretches(column, table.index)))] : []),
        ...(filled ? [{ text: count(countFilled(column)), value: countFilled(column) }] : []),
      ];
    }),
  };
}

function columnsPart(table: TimeTable): Part {
  const model = columnsTable(table);
  const { ordinals } = table.index;
  const lines = table.columns.slice(0, most).map((column) => {
    if (column.kind === "text") return html``;
    return image(spark(ordinals, column.values, column.filled), `${column.name} over time`, "display:block");
  });
  return tablePart(
    model,
    htmlTable(model, {
      at: 1,
      drawn: { head: html`Over time`, cells: lines, width: "180px", stretch: false },
    }),
  );
}

function numeric(table: TimeTable): readonly Column[] {
  return table.columns.filter((column) => column.kind !== "text");
}

/** What a table holds: span, step, gaps, and per column a small line, what is missing, range and kind of number. */
export const timeTableShowing: Showing<TimeTable> = {
  card: (table) => {
    const { source, columns } = table;
    const hidden = columns.length - most;
    return {
      subject: source ? basename(source.description) : "table",
      headline: [
        spanText(table.index),
        `${count(table.T)} ${table.T === 1 ? "row" : "rows"}`,
        `${count(columns.length)} ${columns.length === 1 ? "column" : "columns"}`,
      ],
      remarks: table.findings,
      parts: [
        columnsPart(table),
        ...(hidden > 0 ? [factsPart([["Not shown", `${count(hidden)} more columns`]])] : []),
        ...missingPart(table),
        factsPart(
          [
            ["Time", table.index.name + (table.index.zone ? `, written in ${table.index.zone}` : "")],
            ...(source?.fingerprint ? [["File", source.fingerprint] as const] : []),
            ...table.provenance.map((line, i) => [`Step ${i + 1}`, line] as const),
          ],
          "Where it came from",
        ),
      ],
      fingerprint: table.fingerprint,
      shown: { columns: columns.map((column) => ({ name: column.name, ...columnSummary(column) })) },
    };
  },
  tables: { columns: columnsTable },
  charts: {
    series: (table, of) => {
      const chosen = of === undefined ? numeric(table).slice(0, 12) : [requireColumn("chart", table, of)];
      return seriesChart(
        `${chosen.length === 1 ? chosen[0]!.name : "Columns"} over time`,
        table.index,
        chosen.map(({ name, values }) => ({ name, values: values as Float64Array })),
      );
    },
  },
};
