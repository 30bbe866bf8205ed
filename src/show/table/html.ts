import { type Html, html, trusted } from "../text/html.js";
import { atPoint, type Cell, type Column, groups, type TableModel } from "./model.js";

/** A column that is drawn, not written: its heading, and its content in each row. */
export interface DrawnColumn {
  readonly head: Html;
  readonly cells: readonly Html[];
  /** Smallest width, as CSS. */
  readonly width: string;
  /** Whether it takes what room there is. Default true. */
  readonly stretch?: boolean;
}

/** How a table is drawn in HTML. */
export interface HtmlTableOptions {
  /** A drawn column, put before the column of index `at` (default: after the last). */
  readonly drawn?: DrawnColumn;
  readonly at?: number;
  /** Rows to make less prominent, by index. */
  readonly faint?: (row: number) => boolean;
  /** Markup of a cell in place of its text. */
  readonly markup?: (row: number, column: number) => Html | undefined;
  /** Whether the title is shown above the table. Default false. */
  readonly caption?: boolean;
}

const line = "1px solid rgba(128,128,128,0.35)";
const base = "padding:0.2em 0.5em";
const sides = { left: "text-align:left", right: "text-align:right", decimal: "text-align:right" };

/**
 * A table in HTML. Every look is an inline style from the set that JupyterLab's sanitiser lets through; colours are
 * inherited, lines are a grey that shows on light and dark. Wide tables scroll inside their own box.
 */
export function htmlTable(table: TableModel, options: HtmlTableOptions = {}): Html {
  const { drawn, faint, markup } = options;
  const at = options.at ?? table.columns.length;
  const texts = table.columns.map((column, j) =>
    written(
      column,
      table.rows.map((row) => row[j]!),
    ),
  );
  const runs = groups(table.columns);
  const two = runs.some((run) => run.title !== undefined && run.columns.some((c) => c.title !== ""));
  const over: Html[] = [];
  let position = 0;
  const drawnHead =
    drawn &&
    header(
      drawn.head,
      "left",
      1,
      two ? 2 : 1,
      `min-width:${drawn.width};width:${drawn.stretch === false ? drawn.width : "40%"}`,
    );
  for (const run of runs) {
    if (position === at && drawnHead) over.push(drawnHead);
    const alone = run.title === undefined;
    const title = alone ? run.columns[0]!.title : run.title;
    over.push(header(html`${title}`, run.columns[0]!.align, run.columns.length, alone && two ? 2 : 1));
    position += run.columns.length;
  }
  if (at >= position && drawnHead) over.push(drawnHead);
  const under = table.columns
    .filter((c) => c.group !== undefined)
    .map((c) => header(html`${c.title}`, c.align, 1, 1, "font-weight:normal;opacity:0.8"));
  const rows = table.rows.map((row, i) => {
    const cells = row.map((cell, j) => {
      const content = markup?.(i, j) ?? texts[j]![i]!;
      return data(content, table.columns[j]!, j === 0, cell);
    });
    if (drawn) cells.splice(at, 0, html`<td style="${base};text-align:left">${drawn.cells[i]}</td>`);
    return html`<tr style="background:none${faint?.(i) ? ";opacity:0.75" : ""}">${cells}</tr>`;
  });
  const caption =
    options.caption &&
    html`<caption style="caption-side:top;text-align:left;padding:0 0 0.2em 0;font-style:normal">${table.title}</caption>`;
  return html`<div style="overflow-x:auto;max-width:100%"><table style="border-collapse:collapse;table-layout:auto;margin:0;width:auto;font-size:1em;font-variant-numeric:tabular-nums">${caption}<thead style="border-bottom:${line};vertical-align:bottom"><tr style="background:none">${over}</tr>${
    two && html`<tr style="background:none">${under}</tr>`
  }</thead><tbody>${rows}</tbody></table></div>`;
}

function header(content: Html, align: Column["align"], columns: number, rows: number, style = ""): Html {
  const spans = `${columns > 1 ? ` colspan="${columns}"` : ""}${rows > 1 ? ` rowspan="${rows}"` : ""}`;
  return html`<th scope="col"${trusted(spans)} style="${base};vertical-align:bottom;white-space:nowrap;${sides[align ?? "left"]};font-weight:bold;${style}">${content}</th>`;
}

function data(content: Html, column: Column, first: boolean, cell: Cell): Html {
  const align = column.align ?? "left";
  const full = typeof cell.value === "string" && cell.value !== cell.text && cell.value.length <= 300;
  const title = full && html` title="${cell.value as string}"`;
  // Long names and sentences may break, also in the middle of a word; figures and short names never.
  const long = align === "left" && cell.text.length > (column.wrap ? 1.5 * column.wrap : 40);
  const wrapping = long ? `min-width:${column.wrap ?? 14}em;overflow-wrap:break-word` : "white-space:nowrap";
  const style = `${base};${sides[align]};${wrapping}`;
  return first
    ? html`<th scope="row"${title} style="${style};font-weight:normal">${content}</th>`
    : html`<td${title} style="${style}">${content}</td>`;
}

// Figure spaces (as wide as a figure) and punctuation spaces (as wide as a point) bring the points below each other
// whatever the viewer makes of styles.
function written(column: Column, cells: readonly Cell[]): Html[] {
  if (column.align !== "decimal") return cells.map((cell) => html`${cell.text}`);
  const parts = cells.map((cell) => atPoint(cell.text));
  const most = parts.reduce((n, [, after]) => Math.max(n, [...after].length), 0);
  return parts.map(([before, after]) => {
    const pad = most - [...after].length;
    const filling =
      pad > 0 && !after.startsWith(".") ? `\u2008${"\u2007".repeat(pad - 1)}` : "\u2007".repeat(pad);
    return html`${before}${after}${trusted(filling)}`;
  });
}
