import type { TermColumn, Use } from "../term.js";

type Made = Pick<TermColumn, "values" | "edge" | "filled" | "uses">;

/** Two columns made one, row by row: missing beyond the table where either is, filled where either is. */
export function combined(a: TermColumn, b: TermColumn, operation: (a: number, b: number) => number): Made {
  const values = new Float64Array(a.values.length);
  for (let row = 0; row < values.length; row++) values[row] = operation(a.values[row]!, b.values[row]!);
  return {
    values,
    edge: either(a.edge, b.edge),
    filled: either(a.filled, b.filled),
    uses: mergedUses([...a.uses, ...b.uses]),
  };
}

function either(a: Uint8Array | undefined, b: Uint8Array | undefined): Uint8Array | undefined {
  if (!a || !b) return a ?? b;
  return a.map((flag, row) => flag | b[row]!);
}

/** One entry for each column, from its newest to its oldest value. */
export function mergedUses(uses: readonly Use[]): Use[] {
  const merged = new Map<string, Use>();
  for (const use of uses) {
    const known = merged.get(use.column);
    merged.set(use.column, {
      column: use.column,
      newest: Math.min(use.newest, known?.newest ?? use.newest),
      oldest: Math.max(use.oldest, known?.oldest ?? use.oldest),
    });
  }
  return [...merged.values()];
}
