/** One executed cell. */
export interface Entry {
  readonly session: number;
  readonly line: number;
  readonly input: string;
  output: string | null;
}

/** The cells of this session, as `history_request` asks for them. */
export class History {
  readonly #entries: Entry[] = [];

  add(line: number, input: string): void {
    this.#entries.push({ session: 1, line, input, output: null });
  }

  /** Adds the result of the cell that was added last. */
  addOutput(output: string): void {
    const last = this.#entries.at(-1);
    if (last) last.output = output;
  }

  /** The `history` of a reply: [session, line, input], with the output beside the input when it is wanted. */
  answer(request: Readonly<Record<string, unknown>>): unknown[] {
    const entries = this.#select(request);
    return entries.map(({ session, line, input, output }) =>
      request["output"] === true ? [session, line, [input, output]] : [session, line, input],
    );
  }

  #select(request: Readonly<Record<string, unknown>>): Entry[] {
    const count = typeof request["n"] === "number" ? request["n"] : undefined;
    switch (request["hist_access_type"]) {
      case "tail":
        return count === undefined ? [...this.#entries] : this.#entries.slice(-Math.max(count, 1));
      case "range": {
        const session = Number(request["session"] ?? 0);
        if (session !== 0 && session !== 1) return [];
        const start = Number(request["start"] ?? 0);
        const stop =
          request["stop"] === null || request["stop"] === undefined
            ? Number.POSITIVE_INFINITY
            : Number(request["stop"]);
        return this.#entries.filter(({ line }) => line >= start && line < stop);
      }
      case "search": {
        const pattern = globToPattern(String(request["pattern"] ?? "*"));
        let found = this.#entries.filter(({ input }) => pattern.test(input));
        if (request["unique"] === true) {
          found = found.filter((entry, i) => found.findLastIndex(({ input }) => input === entry.input) === i);
        }
        return count === undefined ? found : found.slice(-count);
      }
      default:
        return [];
    }
  }
}

function globToPattern(glob: string): RegExp {
  const escaped = glob.replace(/[.+^${}()|[\]\\]/g, "\\$&");
  return new RegExp(`^${escaped.replaceAll("*", "[^]*").replaceAll("?", "[^]")}$`);
}
