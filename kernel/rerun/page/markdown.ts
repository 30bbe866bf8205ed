import MarkdownIt from "markdown-it";
import { type Cell, joined } from "../notebook.js";
import { codeToHtml } from "./code.js";
import { escapeHtml } from "./escape.js";
import { mathPlugin } from "./math.js";
import { pictureAddress } from "./pictures.js";

// HTML within markdown is shown as text, never passed on, and markdown-it refuses addresses such as javascript:.
const markdown = new MarkdownIt({
  html: false,
  highlight: (code, language) => codeToHtml(code, alias(language)),
});
mathPlugin(markdown);

interface Surroundings {
  cell: Cell;
  folder: string | undefined;
}

markdown.renderer.rules["image"] = (tokens, at, options, env, renderer) => {
  const token = tokens[at]!;
  const { cell, folder } = env as unknown as Surroundings;
  const alternative = renderer.renderInlineAsText(token.children ?? [], options, env);
  const source = String(token.attrGet("src") ?? "");
  const address = pictureAddress(source, cell, folder);
  if (address) return `<img src="${address}" alt="${escapeHtml(alternative)}">`;
  // A picture elsewhere is named, not loaded.
  return `<a href="${escapeHtml(source)}">${escapeHtml(alternative || source)}</a>`;
};

// markdown-it judges addresses before they are drawn; attachments have a scheme of their own.
const usual = markdown.validateLink;
markdown.validateLink = (address) => address.startsWith("attachment:") || usual(address);

/** A markdown cell as HTML. @param folder the notebook's folder, for pictures beside it */
export function markdownToHtml(cell: Cell, folder?: string): string {
  return markdown.render(joined(cell.source), { cell, folder } satisfies Surroundings);
}

/** The first heading of a markdown text, as plain text. */
export function firstHeading(source: string): string | undefined {
  const tokens = markdown.parse(source, {
    cell: { cell_type: "markdown", source, metadata: {} },
    folder: undefined,
  });
  const at = tokens.findIndex((token) => token.type === "heading_open");
  const inner = tokens[at + 1]?.children ?? [];
  const text = at === -1 ? "" : inner.map((token) => token.content).join("");
  return text.trim() || undefined;
}

function alias(language: string): string {
  return { ts: "typescript", js: "typescript", javascript: "typescript", py: "python" }[language] ?? language;
}
