import type { Compiler } from "../compiler/compiler.js";
import { columnsAt } from "./columns.js";
import { type Completions, merged } from "./completions.js";
import { filesAt } from "./files.js";
import { placeAt } from "./place.js";

/** What completions are made from. */
export interface Surroundings {
  readonly compiler: Compiler;
  readonly declarations: string;
  readonly values: Readonly<Record<string, unknown>>;
  readonly directory: string;
}

/**
 * What fits at an offset. In a string: the texts that its type allows, else files, or names of columns or of a fit's
 * terms. As a key of an object, or behind the dot of a row: columns too. Elsewhere: what the type checker knows.
 */
export function complete(surroundings: Surroundings, code: string, offset: number): Completions {
  const place = placeAt(code, offset);
  const known = checked(surroundings, code, offset);
  if (place.kind === "string") {
    const allowed = only(known, "string");
    if (allowed.matches.length > 0) return { ...allowed, start: place.start, end: place.end };
    const files = filesAt(place, code, offset, surroundings.directory);
    return files ?? columnsAt(place, code, offset, surroundings.values) ?? allowed;
  }
  const columns = columnsAt(place, code, offset, surroundings.values);
  if (!columns) return known;
  if (place.kind === "member") return merged(columns, known);
  // An object of options has keys of its own; one that maps columns to something has only those.
  const options = only(known, "property");
  return options.matches.length > 0 ? options : columns;
}

function only(known: Completions, type: string): Completions {
  const kept = known.matches.filter((_, i) => known.types[i] === type);
  return { ...known, matches: kept, types: kept.map(() => type) };
}

/** What the type checker knows. */
function checked(surroundings: Surroundings, code: string, offset: number): Completions {
  const { compiler, declarations, values } = surroundings;
  const found = compiler.complete(declarations, code, offset);
  if (!found) return { matches: [], start: offset, end: offset, types: [] };
  const kinds = new Map((found.original?.entries ?? []).map(({ name, kind }) => [name, String(kind)]));
  return {
    matches: found.candidates,
    start: found.start,
    end: found.end,
    types: found.candidates.map((name) => kindOf(kinds.get(name), values[name])),
  };
}

/** What a match is; of a name from an earlier cell or an import, its value tells. */
function kindOf(kind: string | undefined, value: unknown): string {
  if (kind !== "alias") return kind ?? "name";
  if (typeof value !== "function") return "const";
  return /^class\b/.test(Function.prototype.toString.call(value)) ? "class" : "function";
}
