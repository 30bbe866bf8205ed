import { type CellOutput, type FileBundle, joined, type Multiline } from "../notebook.js";
import { terminalToHtml } from "./ansi.js";
import { escapeHtml } from "./escape.js";
import { markdownToHtml } from "./markdown.js";
import { mathToHtml } from "./math.js";
import { bundlePicture } from "./pictures.js";

/** One output of a code cell as HTML. */
export function outputToHtml(output: CellOutput): string {
  switch (output.output_type) {
    case "stream":
      return `<pre class="stream ${output.name}">${terminalToHtml(joined(output.text))}</pre>`;
    case "error":
      return `<pre class="error">${terminalToHtml(errorText(output))}</pre>`;
    default:
      return `<div class="result">${bundleToHtml(output.data)}</div>`;
  }
}

function errorText(output: Extract<CellOutput, { output_type: "error" }>): string {
  return output.traceback.length > 0 ? output.traceback.join("\n") : `${output.ename}: ${output.evalue}`;
}

/** The richest form that a page without scripts can show. */
function bundleToHtml(data: FileBundle): string {
  const html = text(data["text/html"]);
  if (html !== undefined) return html;
  const picture = bundlePicture(data);
  const plain = text(data["text/plain"]);
  if (picture) return `<img src="${picture}" alt="${escapeHtml(plain ?? "chart")}">`;
  const markdown = text(data["text/markdown"]);
  if (markdown !== undefined)
    return markdownToHtml({ cell_type: "markdown", source: markdown, metadata: {} });
  const latex = text(data["text/latex"]);
  if (latex !== undefined) return mathToHtml(latex.replace(/^\s*\$+|\$+\s*$/g, ""), true);
  if (plain !== undefined) return `<pre>${terminalToHtml(plain)}</pre>`;
  if ("application/json" in data)
    return `<pre>${escapeHtml(JSON.stringify(data["application/json"], null, 2))}</pre>`;
  const kinds = Object.keys(data).map(escapeHtml).join(", ");
  return `<p class="aside">An output that this page can't show: ${kinds}.</p>`;
}

function text(value: unknown): string | undefined {
  if (typeof value === "string") return value;
  return Array.isArray(value) ? joined(value as Multiline) : undefined;
}
