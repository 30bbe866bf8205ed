/** One record of a delimited file: its fields, and the line (1-based) on which it starts. */
export interface RawRecord {
  readonly fields: string[];
  readonly line: number;
  /** What breaks RFC 4180 in it, if anything does. */
  readonly fault?: string;
}

/**
 * Splits delimited text, given piece by piece, into records (RFC 4180: quoted fields may hold delimiters, newlines and
 * doubled quotes; lines may end in \n, \r\n or \r, also mixed). Blank lines are passed over and counted.
 */
export class RecordSplitter {
  /** Lines between records with nothing on them; those at the end of the text are not counted. */
  blankLines = 0;
  /** The first of them. */
  firstBlank = 0;
  #rest = "";
  #line: number;
  #blank: number[] = [];
  readonly #delimiter: string;

  constructor(delimiter: string, firstLine = 1) {
    this.#delimiter = delimiter;
    this.#line = firstLine;
  }

  /** The records that are complete with this piece; with the `last` piece, all that is left. */
  *push(piece: string, last: boolean): Generator<RawRecord> {
    const text = this.#rest + piece;
    let at = 0;
    while (at < text.length) {
      const found = this.#record(text, at, last);
      if (!found) break;
      at = found.end;
      const { record } = found;
      if (record.fields.length === 1 && record.fields[0] === "" && !found.quoted) {
        if (this.#blank.length === 0) this.#blank = [record.line, 0];
        this.#blank[1]!++;
        continue;
      }
      if (this.#blank.length > 0) {
        if (this.blankLines === 0) this.firstBlank = this.#blank[0]!;
        this.blankLines += this.#blank[1]!;
        this.#blank = [];
      }
      yield record;
    }
    this.#rest = text.slice(at);
  }

  /** The record that starts at `at`, or nothing when its end is not in the text yet. */
  #record(
    text: string,
    at: number,
    last: boolean,
  ): { record: RawRecord; end: number; quoted: boolean } | undefined {
    const start = this.#line;
    const fields: string[] = [];
    let lines = 0;
    let quoted = false;
    let fault: string | undefined;
    for (;;) {
      let field = "";
      if (text[at] === '"') {
        quoted = true;
        let from = ++at;
        for (;;) {
          const close = text.indexOf('"', from);
          if (close < 0) {
            if (!last) return undefined;
            fault = `the quote that opens on line ${start + lines} is never closed`;
            field += text.slice(from);
            at = text.length;
            break;
          }
          // A quote at the very end may be the first of a doubled one.
          if (close + 1 >= text.length && !last) return undefined;
          field += text.slice(from, close);
          at = close + 1;
          if (text[at] !== '"') break;
          field += '"';
          from = at + 1;
        }
        lines += newlines(field);
      }
      const from = at;
      while (at < text.length && text[at] !== this.#delimiter && text[at] !== "\n" && text[at] !== "\r") at++;
      if (at > from && quoted && fields.length >= 0 && text[from - 1] === '"')
        fault ??= "text follows a closing quote";
      field += text.slice(from, at);
      fields.push(field);
      if (at >= text.length) {
        if (!last) return undefined;
        break;
      }
      if (text[at] === this.#delimiter) {
        at++;
        if (at >= text.length && !last) return undefined;
        continue;
      }
      // A \r at the very end may be the first half of a \r\n.
      if (text[at] === "\r" && at + 1 >= text.length && !last) return undefined;
      at += text[at] === "\r" && text[at + 1] === "\n" ? 2 : 1;
      lines++;
      break;
    }
    this.#line += lines;
    return { record: { fields, line: start, ...(fault ? { fault } : {}) }, end: at, quoted };
  }
}

function newlines(field: string): number {
  let count = 0;
  for (let i = 0; i < field.length; i++) {
    if (field[i] === "\n" || (field[i] === "\r" && field[i + 1] !== "\n")) count++;
  }
  return count;
}

/** The records of a whole text. */
export function records(text: string, delimiter: string, firstLine = 1): Generator<RawRecord> {
  return new RecordSplitter(delimiter, firstLine).push(text, true);
}
