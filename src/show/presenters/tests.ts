import type { Test } from "../../diagnose/index.js";
import { type Part, tablePart } from "../card/card.js";
import { htmlTable } from "../table/html.js";
import {
  blank,
  type Cell,
  counted,
  probability,
  sentence,
  statistic,
  type TableModel,
} from "../table/model.js";

/** The tests of a diagnostic as a table. The columns for lags and notes are there only if some test has any. */
export function testsTable(title: string, tests: readonly Test[]): TableModel {
  const lags = tests.some((test) => test.lags !== undefined);
  const notes = tests.some((test) => noteOf(test) !== "");
  return {
    title,
    columns: [
      { key: "test", title: "Test" },
      ...(lags ? [{ key: "lags", title: "Lags", align: "right" } as const] : []),
      { key: "statistic", title: "Statistic", align: "decimal" },
      { key: "law", title: "Law", wrap: 6 },
      { key: "p", title: "p", align: "decimal" },
      ...(notes ? [{ key: "note", title: "Note", wrap: 8 }] : []),
    ],
    rows: tests.map((test): Cell[] => [
      sentence(test.name),
      ...(lags ? [test.lags === undefined ? blank : counted(test.lags)] : []),
      statistic(test.statistic),
      sentence(test.distribution),
      probability(test.p),
      ...(notes ? [{ text: noteOf(test) }] : []),
    ]),
  };
}

function noteOf(test: Test): string {
  return [test.valid ? "" : "not valid for this model", test.note ?? ""].filter(Boolean).join("; ");
}

/** The tests of a diagnostic as a part of its card; those not valid for this model stand back. */
export function testsPart(title: string, tests: readonly Test[], folded?: string): Part {
  const table = testsTable(title, tests);
  return tablePart(table, htmlTable(table, { faint: (i) => !tests[i]!.valid }), folded);
}
