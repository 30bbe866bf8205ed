import type { Checkup } from "../../diagnose/index.js";
import { tablePart } from "../card/card.js";
import type { Showing } from "../showing.js";
import { htmlTable } from "../table/html.js";
import { type Cell, probability, type TableModel, words } from "../table/model.js";
import { pValue } from "../text/figures.js";
import { html } from "../text/html.js";
import { legible, name } from "../text/legible.js";
import { diagnosticCard } from "./diagnostic.js";
import { testsPart, testsTable } from "./tests.js";

function mark({ concern, adjusted }: Checkup["lines"][number], level: number): string {
  if (!concern) return "nothing found";
  return Number.isNaN(adjusted) || adjusted < 1 - level ? "concern" : "on its own only";
}

function linesTable(m: Checkup): TableModel {
  return {
    title: `Checkup of ${name(m.outcome)}`,
    columns: [
      { key: "question", title: "Question" },
      { key: "verdict", title: "Verdict" },
      { key: "decides", title: "Decided by", wrap: 8 },
      { key: "adjusted", title: "p, adjusted", align: "decimal" },
      { key: "matters", title: `What it means for ${name(m.coefficient, 30)}`, wrap: 8 },
      { key: "next", title: "To run next", wrap: 8 },
    ],
    rows: m.lines.map((line): Cell[] => [
      words(line.question),
      words(mark(line, m.level)),
      { text: legible(line.figure) },
      Number.isNaN(line.adjusted) ? { text: "", value: null } : probability(line.adjusted),
      { text: legible(line.matters) },
      { text: legible(line.attempt ?? "") },
    ]),
  };
}

/** Whether a specification is sound, question by question. */
export const checkupShowing: Showing<Checkup> = {
  card: (m) => {
    const table = linesTable(m);
    const next = table.columns.length - 1;
    const markup = (i: number, j: number) => {
      const line = m.lines[i]!;
      if (j === 0 && line.concern) return html`<strong>${line.question}</strong>`;
      if (j === next && line.attempt !== undefined) {
        return html`<code style="font-size:0.9em;white-space:pre-wrap">${line.attempt}</code>`;
      }
      return undefined;
    };
    const found = {
      html: html`${m.lines.map(
        (line) =>
          html`<div style="margin:0 0 0.3em 0"><strong>${line.question}</strong> ${
            Number.isNaN(line.p) ? undefined : html`<span style="opacity:0.8">(p ${pValue(line.p)})</span> `
          }${line.finding}</div>`,
      )}`,
      plain: m.lines.map((line) => `${line.question}: ${legible(line.finding)}`).join("\n"),
      folded: "What was found",
    };
    return diagnosticCard(m, "checkup", [
      tablePart(table, htmlTable(table, { markup, faint: (i) => !m.lines[i]!.concern })),
      found,
      testsPart("All tests", m.tests, "All tests"),
    ]);
  },
  tables: { lines: linesTable, tests: (m) => testsTable("All tests of the checkup", m.tests) },
};
