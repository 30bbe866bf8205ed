import { type Row, rowsOf } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { rowTerm, type Term } from "../term.js";

/**
 * A term of your own from each row: `own("real fare", r => r.fare / r.prices)`. The row has every column's value and
 * `period`, its label; null or NaN counts as missing. Throws InputError where it makes text.
 */
export function own(label: string, value: (row: Row, position: number) => number | boolean | null): Term {
  if (typeof label !== "string" || typeof value !== "function") {
    throw new InputError(
      'own: give a name and a function of a row, such as own("real fare", r => r.fare / r.prices).',
    );
  }
  return rowTerm(label, (table) => {
    const read = new Set<string>();
    const rows = rowsOf(table);
    const values = new Float64Array(table.T);
    const filled = new Uint8Array(table.T);
    const marked = new Map(table.columns.flatMap(({ name, filled }) => (filled ? [[name, filled]] : [])));
    let at = 0;
    // One row object for all: what it is asked for is what the term is made of.
    const row = new Proxy({} as Row, {
      get(_, name) {
        if (typeof name === "string" && table.has(name)) {
          read.add(name);
          if (marked.get(name)?.[at]) filled[at] = 1;
        }
        return rows[at]![name as string];
      },
      has: (_, name) => typeof name === "string" && table.has(name),
      ownKeys: () => [...table.names],
      getOwnPropertyDescriptor: (_, name) => ({
        value: rows[at]![name as string],
        enumerable: true,
        configurable: true,
      }),
    });
    for (; at < table.T; at++) {
      const made: unknown = value(row, at);
      if (typeof made !== "number" && typeof made !== "boolean" && made !== null && made !== undefined) {
        throw new InputError(`own: "${label}" is no number in ${rows[at]!.period} (row ${at + 1}).`);
      }
      values[at] = made === null || made === undefined ? Number.NaN : Number(made);
    }
    const uses = [...read].map((column) => ({ column, newest: 0, oldest: 0 }));
    return [{ label, values, filled: marked.size > 0 ? filled : undefined, uses }];
  });
}
