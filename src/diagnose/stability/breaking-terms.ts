import type { Regression } from "../../estimate/index.js";
import { residualised } from "../parts/projection.js";
import { columnLength, scaledColumns } from "./recursion.js";

/** Which terms a break can be looked for in. */
export interface BreakingTerms {
  /** Positions of terms that vary on both sides of every date searched. */
  readonly breaking: readonly number[];
  /** Positions of the others: their coefficients are held. */
  readonly held: readonly number[];
}

/**
 * Terms whose coefficients are determined both on rows 0 .. `first`−1 and on the last `last` rows, taken in order: a step that
 * sets in late is all zero on the first side and cannot break.
 */
export function breakingTerms(
  m: Regression,
  first: number,
  last: number,
  candidates?: readonly number[],
): BreakingTerms {
  const columns = scaledColumns(m);
  const early: Float64Array[] = [];
  const late: Float64Array[] = [];
  const breaking: number[] = [];
  const wanted = candidates ?? columns.map((_, j) => j);
  const extend = (basis: readonly Float64Array[], column: Float64Array): Float64Array | undefined => {
    if (basis.length >= column.length || column.every((x) => x === 0)) return undefined;
    const rest = residualised(column, basis);
    const length = columnLength(rest);
    return length > 1e-7 * columnLength(column) ? rest.map((x) => x / length) : undefined;
  };
  for (const j of wanted) {
    const a = extend(early, columns[j]!.slice(0, first));
    const b = extend(late, columns[j]!.slice(m.T - last));
    if (!a || !b) continue;
    early.push(a);
    late.push(b);
    breaking.push(j);
  }
  return { breaking, held: columns.map((_, j) => j).filter((j) => !breaking.includes(j)) };
}
