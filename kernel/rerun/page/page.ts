import { type Cell, joined, type Notebook } from "../notebook.js";
import type { Failure } from "../rerun.js";
import { codeToHtml } from "./code.js";
import { escapeHtml } from "./escape.js";
import { firstHeading, markdownToHtml } from "./markdown.js";
import { outputToHtml } from "./output.js";
import { style } from "./style.js";

/** What a page is to say beside the notebook's cells. */
export interface PageOptions {
  /** The notebook's file name: the title where the notebook has no heading. */
  readonly name: string;
  /** The notebook's folder, for pictures that its markdown names. */
  readonly folder?: string;
  /** The cell that failed, if the run stopped early. */
  readonly failure?: Failure;
  /** What made the page, in the footer. */
  readonly maker: string;
}

// The page can neither run a script nor load anything, whatever an output holds.
const policy = "default-src 'none'; style-src 'unsafe-inline'; img-src data:; font-src data:";

/** A notebook as one HTML page that stands by itself. */
export function notebookToPage(notebook: Notebook, options: PageOptions): string {
  const title = pageTitle(notebook) ?? options.name;
  const { failure } = options;
  const stopped = failure
    ? `<p class="stopped"><strong>This run stopped at cell ${failure.cell}</strong> [${failure.execution}]: ` +
      `${escapeHtml(failure.message.replace(/\.$/, ""))}. ${left(failure.left)}</p>\n`
    : "";
  const cells = notebook.cells.map((cell) => cellToHtml(cell, options.folder)).join("\n");
  return `<!DOCTYPE html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${policy}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeHtml(title)}</title>
<style>${style}</style>
</head>
<body>
<main>
${stopped}${cells}
</main>
<footer>${escapeHtml(options.name)}, run by ${escapeHtml(options.maker)}</footer>
</body>
</html>
`;
}

function left(cells: number): string {
  if (cells === 0) return "It was the last code cell.";
  return `${cells} code ${cells === 1 ? "cell" : "cells"} after it did not run.`;
}

function pageTitle(notebook: Notebook): string | undefined {
  for (const cell of notebook.cells) {
    const heading = cell.cell_type === "markdown" ? firstHeading(joined(cell.source)) : undefined;
    if (heading) return heading;
  }
  return undefined;
}

function cellToHtml(cell: Cell, folder: string | undefined): string {
  if (cell.cell_type === "markdown") return `<div class="markdown">${markdownToHtml(cell, folder)}</div>`;
  const source = joined(cell.source);
  if (cell.cell_type === "raw") return `<pre class="raw">${escapeHtml(source)}</pre>`;
  if (source.trim() === "") return "";
  const outputs = (cell.outputs ?? [])
    .map((output) => `<div class="output">${outputToHtml(output)}</div>`)
    .join("\n");
  const number = cell.execution_count == null ? "not run" : `[${cell.execution_count}]`;
  return `<section class="code">
<details class="source" open><summary>${number}</summary><pre><code>${codeToHtml(source, "typescript")}</code></pre></details>
${outputs}
</section>`;
}
