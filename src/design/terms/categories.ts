import { type Column, suggestion, type TimeTable } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";
import { requireOptions } from "../resolve.js";
import { rowTerm, type Term, type TermColumn } from "../term.js";

/** Options of `categories`. */
export interface CategoryOptions {
  /** The group that the others are measured against. Default: the first in order of name or number. */
  readonly base?: string | number | boolean;
}

/**
 * A level for each group that a column names, measured against one of them. Throws InputError for fewer than two
 * groups, more than half as many as periods, and a base that is none of them.
 */
export function categories(name: string, options: CategoryOptions = {}): Term {
  if (typeof name !== "string") throw new InputError("categories: give the name of a column.");
  requireOptions("categories", options, ["base"]);
  return rowTerm(`groups of ${name}`, (table) => {
    const column = table.column(name);
    const present = Array.from({ length: table.T }, (_, row) => groupOf(column, row));
    const groups = groupsOf(name, present, table);
    const base = String(options.base ?? groups[0]!);
    if (!groups.includes(base)) {
      throw new InputError(
        `categories: "${name}" has no group ${JSON.stringify(base)}.${suggestion(base, groups)}`,
      );
    }
    return groups
      .filter((group) => group !== base)
      .map(
        (group): TermColumn => ({
          label: `${name}: ${group}`,
          values: Float64Array.from(present, (here) => (here === null ? Number.NaN : here === group ? 1 : 0)),
          filled: column.filled,
          uses: [{ column: name, newest: 0, oldest: 0 }],
          note: `groups of ${name} are measured against ${base}`,
          whenZero:
            "Cut the table to the sample first with .between(...), so that only groups that occur there count.",
        }),
      );
  });
}

function groupOf(column: Column, row: number): string | null {
  if (column.kind === "text") return column.values[row]!;
  const value = column.values[row]!;
  if (Number.isNaN(value)) return null;
  return column.kind === "boolean" ? String(value === 1) : String(value);
}

function groupsOf(name: string, present: readonly (string | null)[], table: TimeTable): string[] {
  const groups = [...new Set(present)].filter((group): group is string => group !== null);
  if (table.column(name).kind === "number") groups.sort((a, b) => Number(a) - Number(b));
  else groups.sort();
  if (groups.length < 2) {
    const only = groups.length === 1 ? `one group only, ${JSON.stringify(groups[0])}` : "no groups";
    throw new InputError(`categories: "${name}" has ${only}; there is nothing to compare.`);
  }
  if (groups.length > table.T / 2) {
    throw new InputError(
      `categories: "${name}" has ${groups.length} groups in ${table.T} periods, too many for levels.`,
    );
  }
  return groups;
}
