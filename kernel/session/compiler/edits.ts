/** A source with edits applied, and where each place in it came from. */
export interface Rewritten {
  readonly text: string;
  /** Offset in the source of an offset in `text`. */
  original(offset: number): number;
  /** Offset in `text` of an offset in the source. */
  rewritten(offset: number): number;
}

/** One change of a source: so many characters at a place give way to others. */
export interface Edit {
  readonly at: number;
  readonly removed: number;
  readonly added: string;
}

/** Applies edits to a source. None may overlap; those at one place are applied in the order given. */
export function applyEdits(source: string, edits: readonly Edit[]): Rewritten {
  const sorted = [...edits].sort((a, b) => a.at - b.at);
  let text = "";
  let at = 0;
  for (const edit of sorted) {
    text += source.slice(at, edit.at) + edit.added;
    at = edit.at + edit.removed;
  }
  text += source.slice(at);
  return {
    text,
    original(offset) {
      let shift = 0;
      for (const edit of sorted) {
        const start = edit.at + shift;
        if (offset < start) break;
        if (offset < start + edit.added.length) return edit.at;
        shift += edit.added.length - edit.removed;
      }
      return offset - shift;
    },
    rewritten(offset) {
      let shift = 0;
      for (const edit of sorted) {
        if (edit.at + edit.removed > offset) break;
        shift += edit.added.length - edit.removed;
      }
      return offset + shift;
    },
  };
}
