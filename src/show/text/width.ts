import stringWidth from "string-width";

/** Columns that a text takes in a terminal: two for wide characters, none for combining ones. */
export function width(text: string): number {
  return stringWidth(text);
}

/** A text filled up with spaces on its right to `columns`. */
export function padEnd(text: string, columns: number): string {
  return text + " ".repeat(Math.max(0, columns - width(text)));
}

/** A text filled up with spaces on its left to `columns`. */
export function padStart(text: string, columns: number): string {
  return " ".repeat(Math.max(0, columns - width(text))) + text;
}

/** Words broken into lines of at most `columns`; a longer word has a line to itself. */
export function wrap(text: string, columns = 96, indent = ""): string {
  const lines: string[] = [];
  let line = "";
  for (const word of text.split(" ")) {
    if (line !== "" && width(line) + 1 + width(word) > columns) {
      lines.push(line);
      line = indent + word;
    } else line = line === "" ? word : `${line} ${word}`;
  }
  return [...lines, line].join("\n");
}
