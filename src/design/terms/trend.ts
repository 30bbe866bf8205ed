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
    const columns: TermColumn[] = [];
    for (let power = 1; power <= degree; power++) {
      const before = columns[power - 2]?.values;
      const values = new Float64Array(ordinals.length);
      for (let row = 0; row < values.length; row++)
        values[row] = (before ? before[row]! : 1) * (ordinals[row]! - start + 1);
      columns.push({ label: power === 1 ? "trend" : `trend${superscript(power)}`, values, uses: [], note });
    }
    return columns;
  });
}
