import { type MimeBundle, presentWith, type Result } from "../data/index.js";
import { InputError } from "../numeric/index.js";
import { bundle, type Card } from "./card/card.js";
import { Chart } from "./chart/chart.js";
import type { ChartSource } from "./chart/spec.js";
import { fingerprintOf } from "./record.js";
import type { TableModel } from "./table/model.js";
import { Table } from "./table/table.js";

/** How one kind of result is shown: as a card, as tables, as charts. The first table and chart are those taken unasked. */
export interface Showing<R extends Result> {
  readonly card: (result: R) => Card | Promise<Card>;
  readonly tables?: Readonly<Record<string, (result: R) => TableModel>>;
  readonly charts?: Readonly<Record<string, (result: R, of?: string) => ChartSource>>;
}

const showings = new Map<string, Showing<never>>();

/** Says how results of a kind are shown. */
export function show<R extends Result>(kind: R["kind"], showing: Showing<R>): void {
  showings.set(kind, showing as Showing<never>);
  presentWith<R>(kind, (result): MimeBundle | Promise<MimeBundle> => {
    const card = showing.card(result);
    return card instanceof Promise ? card.then((ready) => bundle(result, ready)) : bundle(result, card);
  });
}

function chosen<T>(
  asked: string,
  result: Result,
  ways: Readonly<Record<string, T>> | undefined,
  which: string | undefined,
): readonly [string, T] {
  const names = Object.keys(ways ?? {});
  const what = asked === "chart" ? "chart" : "table";
  if (!ways || names.length === 0) {
    throw new InputError(`${asked}: a ${result.kind} result has no ${what}`);
  }
  const name = which ?? names[0]!;
  if (!Object.hasOwn(ways, name)) {
    throw new InputError(
      `${asked}: a ${result.kind} result has no ${what} ${JSON.stringify(which)}; it has ${names.map((n) => `"${n}"`).join(", ")}`,
    );
  }
  return [name, ways[name]!];
}

function showingOf(asked: string, result: unknown): Showing<never> {
  const kind = (result as { kind?: unknown } | null | undefined)?.kind;
  const showing = typeof kind === "string" ? showings.get(kind) : undefined;
  if (showing) return showing;
  const given = result === null ? "null" : typeof result;
  throw new InputError(
    `${asked}: takes a result, such as what fit, dependence or covariances returns, not ${typeof kind === "string" ? `a ${kind} result` : given}`,
  );
}

/**
 * A chart of a result: interactive in JupyterLab (zoom, tooltips), SVG where Vega-Lite is not drawn.
 *
 * @param result anything that Lagbook shows as a card
 * @param which which of its charts; default the first
 * @param of a coefficient or column, for charts that are about one
 *
 * Throws InputError, naming the charts there are, when there is no such chart.
 */
export function chart(result: Result, which?: string, of?: string): Chart {
  const { charts } = showingOf("chart", result) as Showing<Result>;
  const [name, make] = chosen("chart", result, charts, which);
  return new Chart(make(result, of), result, name);
}

/**
 * A table of a result, with `.toLatex()`, `.toMarkdown()`, `.toCsv()`, `.toHtml()` and `.toText()`.
 *
 * @param result anything that Lagbook shows as a card
 * @param which which of its tables; default the first
 *
 * Throws InputError, naming the tables there are, when there is no such table.
 */
export function tableOf(result: Result, which?: string): Table {
  if (result instanceof Table && which === undefined) return result;
  const { tables } = showingOf("tableOf", result) as Showing<Result>;
  const [, make] = chosen("tableOf", result, tables, which);
  return new Table(make(result), fingerprintOf(result));
}
