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

/**
 * Where the formula ends. A single `$` must hug its formula and not run into a figure ("$5 and $6" is money), and
 * holds no code.
 */
function closing(text: string, from: number, fence: string): number | undefined {
  let at = text.indexOf(fence, from);
  while (at !== -1 && text[at - 1] === "\\") at = text.indexOf(fence, at + 1);
  if (at === -1 || at === from) return undefined;
  if (fence === "$$") return at;
  const formula = text.slice(from, at);
  return /^\s|\s$|`/.test(formula) || /\d/.test(text[at + 1] ?? "") ? undefined : at;
}
