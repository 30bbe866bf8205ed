import type { Compiler } from "./compiler/compiler.js";
import type { Bundle } from "./output.js";

/** What is known of the name at a place. */
export interface Inspection {
  readonly found: boolean;
  readonly data: Bundle;
}

/** Type and documentation of the name at an offset; just before it when the offset is behind a name or a parenthesis. */
export function inspectAt(
  compiler: Compiler,
  declarations: string,
  code: string,
  offset: number,
  _detail: number,
): Inspection {
  for (const at of [offset, offset - 1, calledName(code, offset)]) {
    if (at < 0 || at > code.length) continue;
    const info = compiler.inspect(declarations, code, at);
    if (!info) continue;
    // An imported name is told as such; cells have the cell functions without an import of their own.
    const told = (info.displayParts ?? []).map(({ text }) => text).join("");
    const signature = told.replace(/^\(alias\) /, "").replace(/\nimport .*$/, "");
    const documentation = (info.documentation ?? []).map(({ text }) => text).join("");
    const tags = (info.tags ?? []).map(
      (tag) => `@${tag.name} ${(tag.text ?? []).map(({ text }) => text).join("")}`,
    );
    const plain = [signature, documentation, ...tags].filter(Boolean).join("\n\n");
    const fence = "```";
    const markdown = [`${fence}typescript\n${signature}\n${fence}`, documentation, ...tags]
      .filter(Boolean)
      .join("\n\n");
    if (plain) return { found: true, data: { "text/plain": plain, "text/markdown": markdown } };
  }
  return { found: false, data: {} };
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
