import type { TimeTable } from "../../data/index.js";
import { columnsOf } from "../resolve.js";
import type { TermColumn, TermLike, Use } from "../term.js";
import { mergedUses } from "./combine.js";

/** The last `length` values of a term's column, for each row of a table. */
export interface Past {
  readonly column: TermColumn;
  /** From the oldest to the row's own, a new array each time. */
  values(row: number): Float64Array;
  /** Whether any of them is beyond the table's edge, or was filled. */
  any(what: "edge" | "filled", row: number): boolean;
  readonly uses: readonly Use[];
}

/** The past of each column of a term, as it was `back` periods before each row. */
export function pastOf(term: TermLike, table: TimeTable, back: number, length: number): Past[] {
  const { ordinals } = table.index;
  const oneRun = ordinals[table.T - 1]! - ordinals[0]! === table.T - 1 && table.T >= length;
  const offsets = oneRun ? [0, length - 1] : Array.from({ length }, (_, i) => i);
  const columns = offsets.map((i) => columnsOf(term, table, back + i));
  const uses = (j: number) => mergedUses(columns.flatMap((at) => at[j]!.uses));
  return columns[0]!.map((column, j) => {
    const parts = columns.map((at) => at[j]!);
    const past = oneRun ? inOneRun(parts, length) : acrossGaps(parts);
    return { column, uses: uses(j), ...past };
  });
}

type Reading = Pick<Past, "values" | "any">;

// With no gap the values before the first row are all that the rows themselves do not have.
function inOneRun([now, before]: readonly TermColumn[], length: number): Reading {
  const join = <A extends Float64Array | Uint8Array>(made: A, head: A | undefined, rest: A | undefined) => {
    if (head) made.set(head.subarray(0, length - 1));
    if (rest) made.set(rest, length - 1);
    return made;
  };
  const n = now!.values.length + length - 1;
  const values = join(new Float64Array(n), before!.values, now!.values);
  const flags = {
    edge: join(new Uint8Array(n), before!.edge, now!.edge),
    filled: join(new Uint8Array(n), before!.filled, now!.filled),
  };
  return {
    values: (row) => values.slice(row, row + length),
    any: (what, row) => flags[what].subarray(row, row + length).includes(1),
  };
}

function acrossGaps(parts: readonly TermColumn[]): Reading {
  const oldestFirst = [...parts].reverse();
  return {
    values: (row) => Float64Array.from(oldestFirst, ({ values }) => values[row]!),
    any: (what, row) => parts.some((part) => part[what]?.[row] === 1),
  };
}
