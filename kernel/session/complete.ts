import type { Compiler } from "./compiler/compiler.js";
import { columnsAt } from "./complete-columns.js";

/** Completions at a place, offsets in UTF-16 units. */
export interface Completions {
  readonly matches: readonly string[];
  readonly start: number;
  readonly end: number;
  /** What each match is: `function`, `const`, `column`, ... */
  readonly types: readonly string[];
}

/** Inside a string the names of columns (or of a fit's terms), elsewhere what the type checker knows. */
export function complete(
  compiler: Compiler,
  declarations: string,
  values: Readonly<Record<string, unknown>>,
  code: string,
  offset: number,
): Completions {
  const columns = columnsAt(code, offset, values);
  if (columns) return columns;
  const found = compiler.complete(declarations, code, offset);
  const kinds = new Map((found.original?.entries ?? []).map(({ name, kind }) => [name, String(kind)]));
  return {
    matches: found.candidates,
    start: found.start,
    end: found.end,
    types: found.candidates.map((name) => kinds.get(name) ?? "name"),
  };
}
