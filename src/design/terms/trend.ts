import { periodLabel } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { superscript } from "../label.js";
import { calendarTerm, type Term, type TermColumn } from "../term.js";

/**
 * Time itself: 1 in the table's first period, then one more each step, gaps counted; up to a power (`trend(2)` gives
 * trend and trend²). Throws InputError for a degree that is no whole number from 1 to 10.
 */
export function trend(degree = 1): Term {
  if (!Number.isInteger(degree) || degree < 1 || degree > 10) {
    throw new InputError(`trend: the degree must be a whole number from 1 to 10, not ${String(degree)}.`);
  }
  return calendarTerm("trend", (index, ordinals) => {
    const start = index.ordinals[0]!;
    const note = `trend is 1 in ${periodLabel(index, start)}`;
    return Array.from({ length: degree }, (_, i): TermColumn => {
      const label = i === 0 ? "trend" : `trend${superscript(i + 1)}`;
      return { label, values: ordinals.map((ordinal) => (ordinal - start + 1) ** (i + 1)), uses: [], note };
    });
  });
}
