import { posix } from "node:path";

/** The rooms of src/, each of which may import from those before it. */
const order = [
  "numeric",
  "data",
  "design",
  "estimate",
  "covariance",
  "diagnose",
  "resample",
  "ledger",
  "show",
] as const;

/** The longest that a source file may be. */
export const longest = 400;

interface Place {
  /** `src/<room>`, `kernel/<room>`, or the file itself where it stands outside any room. */
  room: string;
  /** Its place in the one-way order. */
  level: number;
}

function placeOf(path: string): Place {
  const [top, name = "", ...rest] = path.split("/");
  if (top === "kernel") return { room: rest.length > 0 ? `kernel/${name}` : path, level: order.length + 1 };
  if (rest.length === 0) return { room: path, level: order.length };
  const level = order.indexOf(name as (typeof order)[number]);
  return { room: `src/${name}`, level };
}

/** The relative imports of a source text, whatever their form. */
export function relativeImports(text: string): string[] {
  const code = text.replace(/\/\*[\s\S]*?\*\//g, "").replace(/^\s*\/\/.*$/gm, "");
  const form = /(?:\bfrom\s*|\bimport\s*\(?\s*)["'](\.{1,2}\/[^"']+)["']/g;
  return [...code.matchAll(form)].map((match) => match[1]!);
}

/**
 * What breaks the rules of the house, one line each: imports go one way, other rooms are entered by their door, only
 * `show` and src/index.ts know of pictures, and no file is too long.
 *
 * @param files the text of every TypeScript file under src/ and kernel/, by its path from the top
 */
export function breaches(files: ReadonlyMap<string, string>): string[] {
  const found: string[] = [];
  for (const [path, text] of files) {
    const from = placeOf(path);
    if (from.level === -1) found.push(`${path} is in no known room`);
    const lines = text.trimEnd().split("\n").length;
    if (lines > longest) found.push(`${path} has ${lines} lines, more than ${longest}`);
    for (const target of relativeImports(text)) {
      const resolved = posix.join(posix.dirname(path), target).replace(/\.js$/, ".ts");
      if (resolved.startsWith("..") || !/^(src|kernel)\//.test(resolved)) {
        found.push(`${path} imports ${target}, which is outside src/ and kernel/`);
        continue;
      }
      const to = placeOf(resolved);
      if (to.room === from.room) continue;
      if (to.level > from.level) found.push(`${path} imports ${target}, against the one way of imports`);
      const door = to.room.endsWith(".ts") ? to.room : `${to.room}/index.ts`;
      if (resolved !== door) found.push(`${path} imports ${target}, past the door of ${to.room}`);
      const mayDraw = path.startsWith("src/show/") || path === "src/index.ts" || path.startsWith("kernel/");
      if (to.room === "src/show" && !mayDraw)
        found.push(`${path} imports ${target}: numbers know nothing of pictures`);
    }
  }
  return found;
}
