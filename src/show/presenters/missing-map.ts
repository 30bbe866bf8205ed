import {
  type Column,
  countMissing,
  gapsOf,
  missingStretches,
  periodLabel,
  type Stretch,
  type TimeTable,
} from "../../data/index.js";
import { type Part, tablePart } from "../card/card.js";
import { image } from "../chart/image.js";
import { missingStrip } from "../chart/missing-strip.js";
import { htmlTable } from "../table/html.js";
import { type TableModel, words } from "../table/model.js";
import { count } from "../text/figures.js";
import { html } from "../text/html.js";
import { stretchesText } from "./stretches.js";

const most = 40;

interface Line {
  readonly name: string;
  readonly stretches: readonly Stretch[];
}

/** The map of missing periods: a strip over time for absent rows and for each column that misses any. Empty if none do. */
export function missingPart(table: TimeTable): Part[] {
  const { ordinals } = table.index;
  const [first, last] = [ordinals[0], ordinals[ordinals.length - 1]];
  // With rows out of order there is no map; the card says so and how to sort them.
  if (first === undefined || last === undefined || !ordered(ordinals)) return [];
  const gaps = gapsOf(table.index);
  const columns = table.columns.filter((column: Column) => countMissing(column) > 0);
  const lines: Line[] = [
    ...(gaps.length > 0 ? [{ name: "rows", stretches: gaps }] : []),
    ...columns
      .slice(0, most)
      .map((column) => ({ name: column.name, stretches: missingStretches(column, table.index) })),
  ];
  if (lines.length === 0) return [];
  const model: TableModel = {
    title: "Missing periods",
    columns: [
      { key: "column", title: "Missing periods" },
      { key: "where", title: "Where" },
    ],
    rows: lines.map(({ name, stretches }) => [
      words(name),
      { text: stretchesText(table.index, stretches, 4) },
    ]),
  };
  const ends = html`<div style="font-weight:normal;opacity:0.8">${periodLabel(table.index, first)}<span style="float:right">${periodLabel(table.index, last)}</span></div>`;
  const strips = lines.map(({ name, stretches }) =>
    image(
      missingStrip(first, last, stretches),
      `${name}: ${count(stretches.length)} missing ${stretches.length === 1 ? "stretch" : "stretches"}`,
      "width:100%;min-width:16em;height:12px;display:block",
    ),
  );
  return [tablePart(model, htmlTable(model, { at: 1, drawn: { head: ends, cells: strips, width: "16em" } }))];
}

function ordered(ordinals: Float64Array): boolean {
  for (let i = 1; i < ordinals.length; i++) if (ordinals[i]! <= ordinals[i - 1]!) return false;
  return true;
}
