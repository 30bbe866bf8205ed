import { levelText, scaleFor, scaleOf, written } from "../text/figures.js";
import { type Cell, type Column, figure, probability, words } from "./model.js";

/** What a coefficient, or a combination of several, comes to. */
export interface Estimate {
  readonly term: string;
  readonly estimate: number;
  readonly se: number;
  readonly low: number;
  readonly high: number;
  readonly p: number;
}

/** The columns of a table of estimates: Term, Estimate, SE, interval with its level, p. */
export function estimateColumns(level: number, first = "Term"): Column[] {
  const group = `${levelText(level)} interval`;
  return [
    { key: first.toLowerCase(), title: first },
    { key: "estimate", title: "Estimate", align: "decimal" },
    { key: "se", title: "SE", align: "decimal" },
    { key: "low", title: "from", group, align: "decimal" },
    { key: "high", title: "to", group, align: "decimal" },
    { key: "p", title: "p", align: "decimal" },
  ];
}

/** The cells of one estimate: all figures to the decimals that its standard error justifies. */
export function estimateCells(row: Estimate): Cell[] {
  const scale = scaleFor([row.estimate, row.low, row.high], row.se);
  return [
    words(row.term),
    figure(row.estimate, scale),
    seCell(row.se, scale),
    figure(row.low, scale),
    figure(row.high, scale),
    probability(row.p),
  ];
}

// A standard error too small for the decimals of its row is not written as zero.
function seCell(se: number, scale: ReturnType<typeof scaleFor>): Cell {
  const shown = written(se, scale);
  return se > 0 && !/[1-9]/.test(shown) ? figure(se, scaleOf(se, 2)) : { text: shown, value: se };
}
