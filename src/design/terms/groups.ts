import { type Row, rowsOf } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { makeTerm, type Term, type TermColumn } from "../term.js";

/** A level for each group that a column names, measured against the first group in order of its name (or `base`). */
export function categories(name: string, options: { readonly base?: string } = {}): Term {
  return makeTerm(`groups of ${name}`, (table) => {
    const column = table.column(name);
    const groupOf = (row: number): string | null => {
      if (column.kind === "text") return column.values[row]!;
      return Number.isNaN(column.values[row]!) ? null : String(column.values[row]!);
    };
    const present = Array.from({ length: table.T }, (_, row) => groupOf(row));
    const groups = [...new Set(present)].filter((group): group is string => group !== null).sort();
    const base = options.base ?? groups[0]!;
    if (!groups.includes(base)) {
      throw new InputError(
        `categories: "${name}" has no group ${JSON.stringify(base)}. There are: ${groups.slice(0, 12).join(", ")}.`,
      );
    }
    if (groups.length < 2)
      throw new InputError(`categories: "${name}" has one group only, ${JSON.stringify(base)}.`);
    if (groups.length > table.T / 2) {
      throw new InputError(
        `categories: "${name}" has ${groups.length} groups in ${table.T} periods, too many for levels.`,
      );
    }
    return groups
      .filter((group) => group !== base)
      .map(
        (group): TermColumn => ({
          label: `${name}: ${group}`,
          values: Float64Array.from(present, (here) => (here === null ? Number.NaN : here === group ? 1 : 0)),
          uses: [name],
          note: `groups of ${name} are measured against ${base}`,
        }),
      );
  });
}

/** A term of your own from each row: `own("real fare", r => r.fare / r.prices)`. null or NaN counts as missing. */
export function own(label: string, value: (row: Row, position: number) => number | boolean | null): Term {
  return makeTerm(label, (table) => {
    const rows = rowsOf(table);
    const values = Float64Array.from(rows, (row, position) => {
      const made = value(row, position);
      if (made === null || made === undefined) return Number.NaN;
      if (typeof made === "string")
        throw new InputError(`own: "${label}" is text in ${row.period}, not a number.`);
      return Number(made);
    });
    return [{ label, values, uses: [] }];
  });
}
