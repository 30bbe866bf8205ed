const short: Record<string, string> = { "\n": "\\n", "\r": "\\r", "\t": "\\t" };

// Control characters; marks that reorder or hide text; separators of lines; halves of surrogate pairs.
const unseen =
  /[\p{Cc}\p{Cs}\u00AD\u061C\u200B\u200E\u200F\u2028\u2029\u202A-\u202E\u2060-\u2069\uFEFF\uFFF9-\uFFFB]/gu;

/**
 * A text from the data in which nothing is hidden: control characters, line breaks and marks that turn the reading
 * direction are written out (`\n`, `\u{202e}`), so that a name can neither break a table's line nor look like another.
 */
export function legible(text: string): string {
  return text.replace(unseen, (c) => short[c] ?? `\\u{${c.codePointAt(0)!.toString(16)}}`);
}

/** A long name cut in its middle, so that both ends can still be told apart. At most `longest` characters. */
export function shorten(text: string, longest = 60): string {
  const characters = [...text];
  if (characters.length <= longest) return text;
  const tail = Math.floor(longest / 4);
  return `${characters.slice(0, longest - tail - 1).join("")}…${characters.slice(-tail).join("")}`;
}

/** A name from the data as every presenter writes it: legible, and cut where it is too long for a line. */
export function name(text: string, longest = 60): string {
  return shorten(legible(text.length > 4000 ? `${text.slice(0, 2000)}${text.slice(-2000)}` : text), longest);
}
