import type { MimeBundle, Remark, Result } from "../../data/index.js";
import { recordOf, recordType } from "../record.js";
import type { TableModel } from "../table/model.js";
import { plainTable } from "../table/plain.js";
import { type Html, html } from "../text/html.js";
import { legible, name } from "../text/legible.js";
import { padEnd, width, wrap } from "../text/width.js";
import { lagbookVersion } from "../version.js";

/** A label and what it says, for lists of facts. */
export type Fact = readonly [label: string, text: string];

/** A part of a card: markup for a page, text for everything else. */
export interface Part {
  readonly html: Html;
  readonly plain: string;
  /** Given: folded away under this title in HTML. */
  readonly folded?: string;
  /** Whether a folded part starts open. Default false. */
  readonly open?: boolean;
}

/** What a card is made of, from top to bottom. */
export interface Card {
  /** What it is about, first and bold in its line: the outcome, or the table. */
  readonly subject: string;
  /** The rest of that line: span, number of periods, covariance estimator. */
  readonly headline: readonly string[];
  readonly finding?: string;
  readonly remarks?: readonly Remark[];
  readonly parts: readonly Part[];
  readonly fingerprint?: string;
  /** Figures on the card that the result's own record does not hold, for the record. */
  readonly shown?: Record<string, unknown>;
}

const severity = { note: "Note", caution: "Caution" } as const;

/** The MIME bundle of a card: HTML, plain text and the record. */
export function bundle(result: Result, card: Card): MimeBundle {
  return {
    "text/plain": plainCard(card),
    "text/html": htmlCard(card).markup,
    [recordType]: recordOf(result, card.shown),
  };
}

/**
 * A card in HTML. It inherits font and colours, so it fits a light page and a dark one; it has no script, no style
 * element and no identifier; the two classes keep MathJax from reading dollar signs in names as formulas.
 */
export function htmlCard(card: Card): Html {
  const { finding, remarks = [], parts } = card;
  const small = "font-size:0.85em;opacity:0.8";
  return html`<div class="lagbook mathjax_ignore tex2jax_ignore" style="max-width:80em;margin:0.3em 0;padding:0.5em 0 0.4em 0.9em;border-left:3px solid rgba(0,114,178,0.75);text-align:left;line-height:1.45;overflow-wrap:break-word;page-break-inside:avoid"><div style="margin:0 0 0.3em 0"><strong>${name(card.subject)}</strong>${card.headline.map(
    (fact) => html`<span style="opacity:0.8"> · ${fact}</span>`,
  )}</div>${
    finding !== undefined &&
    html`<div style="margin:0 0 0.5em 0;max-width:56em;font-size:1.1em">${finding}</div>`
  }${remarksHtml(remarks)}${parts.filter((part) => part.html.markup !== "").map(partHtml)}<div style="margin:0.5em 0 0 0;${small}">${footer(card).join(" · ")}</div></div>`;
}

// Many remarks would push the figures out of sight: cautions first, and what is over is folded away.
const openRemarks = 5;

function remarksHtml(remarks: readonly Remark[]): Html {
  if (remarks.length <= openRemarks + 1) return html`${remarks.map(remarkHtml)}`;
  const sorted = [...remarks].sort(
    (a, b) => Number(b.severity === "caution") - Number(a.severity === "caution"),
  );
  const folded = sorted.slice(openRemarks).map(remarkHtml);
  return html`${sorted.slice(0, openRemarks).map(remarkHtml)}<details style="margin:0.2em 0 0.5em 0"><summary style="cursor:pointer">${folded.length} more remarks</summary><div style="margin:0.3em 0 0 1em">${folded}</div></details>`;
}

function remarkHtml({ severity: kind, text }: Remark): Html {
  const mark =
    kind === "caution" ? "border-left:3px solid #D55E00" : "border-left:3px solid rgba(128,128,128,0.5)";
  return html`<div style="margin:0 0 0.4em 0;max-width:60em;padding:0 0 0 0.6em;${mark}"><strong>${severity[kind]}:</strong> ${text}</div>`;
}

function partHtml(part: Part): Html {
  if (part.folded === undefined) return html`<div style="margin:0.3em 0 0.5em 0">${part.html}</div>`;
  return html`<details${part.open && html` open`} style="margin:0.2em 0"><summary style="cursor:pointer">${part.folded}</summary><div style="margin:0.3em 0 0.6em 1em">${part.html}</div></details>`;
}

function footer({ fingerprint }: Card): string[] {
  return [...(fingerprint ? [`data ${fingerprint.slice(0, 16)}`] : []), `lagbook ${lagbookVersion()}`];
}

/** A card as plain text: everything that the HTML says, folded parts included. */
export function plainCard(card: Card): string {
  const blocks = [
    [name(card.subject), ...card.headline.map(legible)].join(" · "),
    ...(card.finding === undefined ? [] : [wrap(legible(card.finding))]),
    ...(card.remarks ?? []).map(({ severity: kind, text }) =>
      wrap(`${severity[kind]}: ${legible(text)}`, 96, "  "),
    ),
    ...card.parts
      .filter((part) => part.plain !== "")
      .map((part) => (part.folded === undefined ? part.plain : `${part.folded}\n${part.plain}`)),
    footer(card).join(" · "),
  ];
  return blocks.join("\n\n");
}

/** A part made of a table, drawn as given and written as plain text. */
export function tablePart(table: TableModel, markup: Html, folded?: string): Part {
  return { html: markup, plain: plainTable(table), ...(folded === undefined ? {} : { folded }) };
}

/** A part that lists facts, each with its label. */
export function factsPart(facts: readonly Fact[], folded?: string): Part {
  const labels = facts.reduce((most, [label]) => Math.max(most, width(legible(label))), 0);
  const cells = facts.map(
    ([label, text]) =>
      html`<div style="opacity:0.8">${label}:</div><div style="overflow-wrap:break-word">${text}</div>`,
  );
  return {
    html: html`<div style="display:grid;grid-template-columns:max-content 1fr;column-gap:0.9em">${cells}</div>`,
    plain: facts
      .map(([label, text]) => `${padEnd(`${legible(label)}:`, labels + 1)} ${legible(text)}`)
      .join("\n"),
    ...(folded === undefined ? {} : { folded }),
  };
}

/** A part that is a picture, said in words in the plain text. */
export function picturePart(image: Html, description: string, folded?: string): Part {
  return { html: image, plain: description, ...(folded === undefined ? {} : { folded }) };
}
