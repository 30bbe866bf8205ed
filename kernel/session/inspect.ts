import { displaySymbol } from "../../src/data/index.js";
import { inspected } from "./bundle.js";
import type { Surroundings } from "./completion/complete.js";
import type { Bundle } from "./output.js";

/** What is known of the name at a place. */
export interface Inspection {
  readonly found: boolean;
  readonly data: Bundle;
}

/**
 * Type and documentation of the name at an offset; just before it when the offset is behind a name or a parenthesis. Of a
 * variable also the beginning of its present value, or all of it with `detail` 1 or more.
 */
export function inspectAt(
  { compiler, declarations, values }: Surroundings,
  code: string,
  offset: number,
  detail: number,
): Inspection {
  for (const at of [offset, offset - 1, calledName(code, offset)]) {
    if (at < 0 || at > code.length) continue;
    const info = compiler.inspect(declarations, code, at);
    if (!info) continue;
    // An imported name is told as such; cells have the cell functions without an import of their own.
    const told = (info.displayParts ?? []).map(({ text }) => text).join("");
    if (told === "any") continue; // a name that is nowhere declared
    const signature = told.replace(/^\(alias\) /, "").replace(/\nimport .*$/, "");
    const documentation = (info.documentation ?? []).map(({ text }) => text).join("");
    const tags = (info.tags ?? []).map(
      (tag) => `@${tag.name} ${(tag.text ?? []).map(({ text }) => text).join("")}`,
    );
    const value = beginning(
      presentValue(nameAt(code, at), values),
      detail > 0 ? Number.POSITIVE_INFINITY : 8,
    );
    const plain = [signature, documentation, ...tags, value].filter(Boolean).join("\n\n");
    const fence = "```";
    const shown = value && `${fence}\n${value}\n${fence}`;
    const markdown = [`${fence}typescript\n${signature}\n${fence}`, documentation, ...tags, shown]
      .filter(Boolean)
      .join("\n\n");
    if (plain) return { found: true, data: { "text/plain": plain, "text/markdown": markdown } };
  }
  return { found: false, data: {} };
}

function beginning(text: string, most: number): string {
  const lines = text.split("\n");
  return lines.length > most ? [...lines.slice(0, most), "…"].join("\n") : text;
}

function nameAt(code: string, offset: number): string {
  const before = /[\p{L}\p{N}_$]*$/u.exec(code.slice(0, offset))![0];
  const after = /^[\p{L}\p{N}_$]*/u.exec(code.slice(offset))![0];
  return code[offset - before.length - 1] === "." ? "" : before + after;
}

/** A variable's value as text: as it shows, if that can be had at once. Of functions the type says all. */
function presentValue(name: string, values: Readonly<Record<string, unknown>>): string {
  const value = Object.hasOwn(values, name) ? values[name] : undefined;
  if (value === undefined || typeof value === "function") return "";
  try {
    const bundle = (value as Record<symbol, (() => unknown) | undefined> | null)?.[displaySymbol]?.();
    const text = (bundle as { "text/plain"?: unknown } | undefined)?.["text/plain"];
    return typeof text === "string" ? text : inspected(value);
  } catch {
    return inspected(value);
  }
}

/** Offset of the name of the call whose parentheses hold the place, or −1. */
function calledName(code: string, offset: number): number {
  let depth = 0;
  for (let i = Math.min(offset, code.length) - 1; i >= 0; i--) {
    if (code[i] === ")") depth++;
    if (code[i] !== "(") continue;
    if (depth > 0) depth--;
    else return i - 1;
  }
  return -1;
}
