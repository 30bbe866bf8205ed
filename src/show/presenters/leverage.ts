import { periodLabel } from "../../data/index.js";
import type { Leverage } from "../../diagnose/index.js";
import { tablePart } from "../card/card.js";
import { chartPart } from "../chart/part.js";
import { pathPanel } from "../chart/paths.js";
import type { ChartSource } from "../chart/spec.js";
import type { Showing } from "../showing.js";
import { htmlTable } from "../table/html.js";
import { blank, type Cell, statistic, type TableModel, words } from "../table/model.js";
import { count, significant } from "../text/figures.js";
import { name } from "../text/legible.js";
import { diagnosticCard, timesOf } from "./diagnostic.js";
import { testsPart, testsTable } from "./tests.js";

const most = 10;

function byCook(m: Leverage) {
  // Leverage one has no Cook's distance and comes first: such a period is fitted whatever the rest say.
  const weight = (cook: number) => (Number.isNaN(cook) ? Number.POSITIVE_INFINITY : cook);
  return [...m.periods].sort((a, b) => weight(b.cook) - weight(a.cook));
}

/** The term that leaving something out moves furthest. */
function furthest(m: Leverage, moves: readonly number[]): Cell[] {
  let at = -1;
  for (let j = 0; j < moves.length; j++) {
    if (Number.isFinite(moves[j]!) && (at === -1 || Math.abs(moves[j]!) > Math.abs(moves[at]!))) at = j;
  }
  return at === -1 ? [blank, blank] : [words(m.terms[at]!), statistic(moves[at]!, 3)];
}

const moved = [
  { key: "term", title: "Moves most" },
  { key: "move", title: "by, in SE", align: "decimal" },
] as const;

function periodsTable(m: Leverage): TableModel {
  const { index } = timesOf(m);
  return {
    title: `Periods that weigh most in the fit of ${name(m.outcome)}`,
    columns: [
      { key: "period", title: "Period" },
      { key: "leverage", title: "Leverage", align: "decimal" },
      { key: "studentised", title: "Studentised residual", align: "decimal" },
      { key: "cook", title: "Cook's distance", align: "decimal" },
      ...moved,
    ],
    rows: byCook(m)
      .slice(0, most)
      .map((row) => [
        words(periodLabel(index, row.period)),
        statistic(row.leverage, 3),
        statistic(row.studentised, 3),
        statistic(row.cook, 3),
        ...furthest(m, row.dfbetas),
      ]),
  };
}

function blocksTable(m: Leverage): TableModel {
  const size = (moves: readonly number[]) => moves.reduce((n, x) => Math.max(n, Math.abs(x) || 0), 0);
  return {
    title: `Stretches of ${m.blockLength} periods left out`,
    columns: [{ key: "left out", title: "Left out" }, ...moved],
    rows: [...m.blocks]
      .sort((a, b) => size(b.moves) - size(a.moves))
      .slice(0, most)
      .map((block) => [words(block.label), ...furthest(m, block.moves)]),
  };
}

function collinearityTable(m: Leverage): TableModel {
  const { collinearity } = m;
  return {
    title: "Variance inflation of each term by the others",
    columns: [
      { key: "term", title: "Term" },
      { key: "vif", title: "Variance inflation", align: "decimal" },
    ],
    rows: collinearity.varianceInflation
      .filter(({ factor }) => !Number.isNaN(factor))
      .map(({ term, factor }) => [words(term), statistic(factor, 3)]),
  };
}

function cookChart(m: Leverage): ChartSource {
  const { index } = timesOf(m);
  const first = byCook(m)[0];
  const said = first
    ? ` largest in ${periodLabel(index, first.period)} (${significant(first.cook, 3)}, leverage ${significant(first.leverage, 3)})`
    : "";
  return {
    title: `Cook's distance of the periods of ${name(m.outcome)}`,
    description: `Cook's distance of ${count(m.periods.length)} periods of ${name(m.outcome)}:${said}.`,
    body: pathPanel(index, {
      points: m.periods.map(({ period, cook }) => ({ at: period, value: cook })),
      title: "Cook's distance",
      mark: "points",
      zero: true,
      height: 150,
    }),
  };
}

/** Which periods carry the fit. */
export const leverageShowing: Showing<Leverage> = {
  card: async (m) => {
    const [periods, blocks, collinear] = [periodsTable(m), blocksTable(m), collinearityTable(m)];
    return diagnosticCard(m, "weight of single periods", [
      await chartPart(cookChart(m)),
      tablePart(periods, htmlTable(periods)),
      ...(blocks.rows.length > 0 ? [tablePart(blocks, htmlTable(blocks), blocks.title)] : []),
      ...(m.tests.length > 0 ? [testsPart("Tests", m.tests, "Tests of the most unusual period")] : []),
      ...(collinear.rows.length > 0 ? [tablePart(collinear, htmlTable(collinear), collinear.title)] : []),
    ]);
  },
  tables: {
    periods: periodsTable,
    blocks: blocksTable,
    collinearity: collinearityTable,
    tests: (m) => testsTable("Tests of the most unusual period", m.tests),
  },
  charts: { "Cook's distance": cookChart },
};
