import type { TimeTable } from "../data/index.js";
import type { TermColumn } from "./term.js";

/**
 * A column of the table as it was `back` periods before each row (negative: after), in time and not in rows: missing
 * where that period has no row. Missing values outside the table's span are marked as beyond its edge.
 */
export function moved(column: TermColumn, back: number, { T, index }: TimeTable): TermColumn {
  if (back === 0) return column;
  const { ordinals } = index;
  const values = new Float64Array(T).fill(Number.NaN);
  const edge = new Uint8Array(T);
  const filled = column.filled && new Uint8Array(T);
  if (ordinals[T - 1]! - ordinals[0]! === T - 1) {
    const from = Math.max(0, -back);
    const to = Math.max(from, Math.min(T, T - back));
    edge.fill(1);
    if (to > from) {
      values.set(column.values.subarray(from, to), from + back);
      edge.fill(0, from + back, to + back);
      filled?.set(column.filled!.subarray(from, to), from + back);
    }
  } else {
    const rows = new Map<number, number>();
    for (let row = 0; row < T; row++) rows.set(ordinals[row]!, row);
    for (let row = 0; row < T; row++) {
      const wanted = ordinals[row]! - back;
      const source = rows.get(wanted);
      if (source === undefined) edge[row] = wanted < ordinals[0]! || wanted > ordinals[T - 1]! ? 1 : 0;
      else {
        values[row] = column.values[source]!;
        if (filled) filled[row] = column.filled![source]!;
      }
    }
  }
  const uses = column.uses.map((use) => ({
    column: use.column,
    newest: use.newest + back,
    oldest: use.oldest + back,
  }));
  return { ...column, values, edge, filled, uses };
}
