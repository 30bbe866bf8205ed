import { legible } from "./legible.js";

const entities: Record<string, string> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
};

/** Markup that is safe to put on a page. Only `html` and `trusted` make it. */
export class Html {
  constructor(readonly markup: string) {}
}

/** What may stand in a template of `html`. Strings and numbers are escaped; false and undefined leave nothing. */
export type Piece = Html | string | number | false | undefined | readonly Piece[];

/** A text with everything that means something to HTML made harmless, for content and quoted attributes alike. */
export function escapeHtml(text: string): string {
  return legible(text).replace(/[&<>"']/g, (character) => entities[character]!);
}

function markupOf(piece: Piece): string {
  if (piece === false || piece === undefined) return "";
  if (piece instanceof Html) return piece.markup;
  if (typeof piece === "object") return piece.map(markupOf).join("");
  return escapeHtml(String(piece));
}

/** Markup from a template: whatever is put in is escaped unless it is markup already. */
export function html(strings: TemplateStringsArray, ...pieces: readonly Piece[]): Html {
  let markup = strings[0]!;
  for (let i = 0; i < pieces.length; i++) markup += markupOf(pieces[i]!) + strings[i + 1]!;
  return new Html(markup);
}

/** Marks a text written by this room as markup. Never for anything that came with the data. */
export function trusted(markup: string): Html {
  return new Html(markup);
}
