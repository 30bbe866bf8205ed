/** One record of a delimited file: its fields, and the line (1-based) on which it starts. */
export interface RawRecord {
  readonly fields: string[];
  readonly line: number;
}

/**
 * Splits delimited text into records (RFC 4180: quoted fields may hold delimiters, newlines and doubled quotes).
 * Blank lines are passed over. Used for the header, for guessing kinds and for finding the place of an error; the
 * values themselves are read by DuckDB.
 */
export function* records(text: string, delimiter: string): Generator<RawRecord> {
  let at = 0;
  let line = 1;
  while (at < text.length) {
    const start = line;
    const fields: string[] = [];
    let ended = false;
    while (!ended) {
      let field = "";
      if (text[at] === '"') {
        at++;
        for (;;) {
          const close = text.indexOf('"', at);
          if (close < 0) {
            field += text.slice(at);
            at = text.length;
            break;
          }
          field += text.slice(at, close);
          at = close + 1;
          if (text[at] !== '"') break;
          field += '"';
          at++;
        }
        for (const character of field) if (character === "\n") line++;
      }
      const from = at;
      while (at < text.length && text[at] !== delimiter && text[at] !== "\n" && text[at] !== "\r") at++;
      field += text.slice(from, at);
      fields.push(field);
      if (at < text.length && text[at] === delimiter) {
        at++;
        continue;
      }
      ended = true;
      if (text[at] === "\r") at++;
      if (text[at] === "\n") at++;
      line++;
    }
    if (fields.length > 1 || fields[0] !== "") yield { fields, line: start };
  }
}
