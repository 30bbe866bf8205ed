import { escapeHtml } from "./escape.js";

const colours = ["black", "red", "green", "yellow", "blue", "magenta", "cyan", "white"];
// A terminal's control sequences: group 1 holds the parameters of one that sets colours, any other is dropped.
// biome-ignore lint/suspicious/noControlCharactersInRegex: the escape character is what is looked for
const sequence = /\u001b\[([\d;]*)m|\u001b\[[\d;?]*[A-Za-ln-z]|\u001b\][^\u0007\u001b]*(?:\u0007|\u001b\\)/g;

interface Pen {
  colour: string | undefined;
  bold: boolean;
}

/**
 * Text of a stream or traceback as HTML: escaped, a terminal's colours and boldness as classes (`ansi-red`,
 * `ansi-bold`), and lines that were written over (a progress line) shown in their last state.
 */
export function terminalToHtml(text: string): string {
  const settled = settle(text);
  const pen: Pen = { colour: undefined, bold: false };
  let html = "";
  let from = 0;
  for (const match of settled.matchAll(sequence)) {
    const { index = 0 } = match;
    html += drawn(settled.slice(from, index), pen);
    if (match[1] !== undefined) change(pen, match[1]);
    from = index + match[0].length;
  }
  return html + drawn(settled.slice(from), pen);
}

function settle(text: string): string {
  return text
    .replace(/\r\n/g, "\n")
    .split("\n")
    .map((line) => {
      const states = line.split("\r").filter((state) => state !== "");
      let shown = states.at(-1) ?? "";
      while (shown.includes("\b")) shown = shown.replace(/[^\b]?\b/, "");
      return shown;
    })
    .join("\n");
}

function change(pen: Pen, parameters: string): void {
  const codes = parameters.split(";").map(Number);
  for (let at = 0; at < codes.length; at++) {
    const code = codes[at]!;
    if (code === 0) {
      pen.colour = undefined;
      pen.bold = false;
    } else if (code === 1) pen.bold = true;
    else if (code === 22) pen.bold = false;
    else if (code === 39) pen.colour = undefined;
    else if (code >= 30 && code <= 37) pen.colour = colours[code - 30];
    else if (code >= 90 && code <= 97) pen.colour = colours[code - 90];
    else if (code === 38 || code === 48) at += codes[at + 1] === 2 ? 4 : 2; // colours by number are left plain
  }
}

function drawn(text: string, pen: Pen): string {
  if (text === "") return "";
  const classes = [pen.colour && `ansi-${pen.colour}`, pen.bold && "ansi-bold"].filter(Boolean).join(" ");
  return classes === "" ? escapeHtml(text) : `<span class="${classes}">${escapeHtml(text)}</span>`;
}
