import katex from "katex";
import type { MarkdownIt } from "markdown-it";

/** LaTeX as MathML, which browsers draw with no script and no font files. What can't be read is shown as written. */
export function mathToHtml(tex: string, display: boolean): string {
  return katex.renderToString(tex, {
    output: "mathml",
    displayMode: display,
    throwOnError: false,
    strict: "ignore",
  });
}

/** A markdown-it plugin: `$...$` within a line, `$$...$$` within or over lines, as Jupyter's markdown has them. */
export function mathPlugin(markdown: MarkdownIt): void {
  markdown.inline.ruler.before("escape", "math", (state, silent) => {
    if (state.src[state.pos] !== "$") return false;
    const fence = state.src.startsWith("$$", state.pos) ? "$$" : "$";
    const from = state.pos + fence.length;
    const to = closing(state.src, from, fence);
    if (to === undefined || to > state.posMax) return false;
    if (!silent) {
      const token = state.push("math", "", 0);
      token.content = state.src.slice(from, to);
      token.meta = { display: fence === "$$" };
    }
    state.pos = to + fence.length;
    return true;
  });
  markdown.renderer.rules["math"] = (tokens, at) => {
    const token = tokens[at]!;
    return mathToHtml(token.content, (token.meta as { display: boolean }).display);
  };
}

/** Where the formula ends. A single `$` must hug its formula and not run into a figure: "$5 and $6" is money. */
function closing(text: string, from: number, fence: string): number | undefined {
  if (fence === "$" && /\s|^$/.test(text[from] ?? "")) return undefined;
  for (let at = text.indexOf(fence, from); at !== -1; at = text.indexOf(fence, at + 1)) {
    if (at === from || text[at - 1] === "\\") continue;
    if (fence === "$" && (/\s/.test(text[at - 1]!) || /\d/.test(text[at + 1] ?? ""))) continue;
    return at;
  }
  return undefined;
}
