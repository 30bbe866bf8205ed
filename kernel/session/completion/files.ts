import { readdirSync } from "node:fs";
import { builtinModules, createRequire } from "node:module";
import { dirname, join } from "node:path";
import { ts } from "../compiler/typescript.js";
import type { Completions } from "./completions.js";
import { isModuleName, type Place } from "./place.js";

/** Files and folders that fit in the string of `load("...")`, modules that fit in that of an import; from the notebook's folder. */
export function filesAt(
  place: Place,
  code: string,
  offset: number,
  directory: string,
): Completions | undefined {
  if (place.kind !== "string") return undefined;
  const { parent } = place.node;
  const typed = code.slice(place.start, offset);
  const loads =
    ts.isCallExpression(parent) &&
    parent.arguments[0] === place.node &&
    ts.isIdentifier(parent.expression) &&
    parent.expression.text === "load";
  const imports = isModuleName(place.node);
  if (!loads && !imports) return undefined;
  const folder = typed.slice(0, typed.lastIndexOf("/") + 1);
  if (imports && !typed.startsWith(".")) {
    const matches = modules(directory).filter((name) => name.startsWith(typed));
    return {
      matches,
      types: matches.map(() => "module"),
      start: place.start,
      end: Math.max(place.end, offset),
    };
  }
  const found = entries(join(directory, dirname(`${folder}x`)), typed.slice(folder.length), imports);
  return {
    matches: found.map(({ name }) => folder + name),
    types: found.map(({ type }) => type),
    start: place.start,
    end: Math.max(place.end, offset),
  };
}

/** Names of modules that can be imported: Lagbook, the packages installed for the folder, Node's own. */
function modules(directory: string): string[] {
  const installed = (createRequire(join(directory, "cell.js")).resolve.paths("x") ?? []).flatMap((folder) =>
    entries(folder, "", false).flatMap(({ name }) =>
      name.startsWith("@")
        ? entries(join(folder, name), "", false).map((scoped) => name + scoped.name)
        : [name],
    ),
  );
  const packages = installed.filter((name) => name.endsWith("/")).map((name) => name.slice(0, -1));
  const own = builtinModules
    .filter((name) => !name.startsWith("_"))
    .flatMap((name) => [name, `node:${name}`]);
  return [...new Set(["lagbook", ...packages, ...own])].sort();
}

function entries(folder: string, typed: string, imports: boolean): { name: string; type: string }[] {
  try {
    return readdirSync(folder, { withFileTypes: true })
      .filter(({ name }) => name.startsWith(typed) && (typed !== "" || !name.startsWith(".")))
      .filter((entry) => entry.isDirectory() || !imports || /\.[cm]?[jt]s$/.test(entry.name))
      .map((entry) => {
        if (entry.isDirectory()) return { name: `${entry.name}/`, type: "folder" };
        return { name: imports ? entry.name.replace(/\.ts$/, "") : entry.name, type: "file" };
      });
  } catch {
    return [];
  }
}
