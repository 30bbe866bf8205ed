/** Completions at a place, offsets in UTF-16 units. */
export interface Completions {
  readonly matches: readonly string[];
  readonly start: number;
  readonly end: number;
  /** What each match is: `function`, `const`, `column`, ... */
  readonly types: readonly string[];
}

/** Several kinds of match for one place, in the order given, without repeats. */
export function merged(first: Completions, second: Completions): Completions {
  const known = new Set(first.matches);
  const more = second.matches.flatMap((match, i) => (known.has(match) ? [] : [[match, second.types[i]!]]));
  return {
    ...first,
    matches: [...first.matches, ...more.map(([match]) => match!)],
    types: [...first.types, ...more.map(([, type]) => type!)],
  };
}
