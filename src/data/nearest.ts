/** The name in `names` closest to `wanted` in edits and case, when one is close enough to be what was meant. */
export function nearestName(wanted: string, names: readonly string[]): string | undefined {
  let best: string | undefined;
  let fewest = Math.max(1, Math.floor(wanted.length / 2)) + 0.5;
  for (const name of names) {
    const distance = edits(wanted.toLowerCase(), name.toLowerCase());
    if (distance < fewest) {
      best = name;
      fewest = distance;
    }
  }
  return best;
}

/** ` Did you mean "fare"?`, or a list of what there is. */
export function suggestion(wanted: string, names: readonly string[]): string {
  const nearest = nearestName(wanted, names);
  if (nearest !== undefined) return ` Did you mean ${JSON.stringify(nearest)}?`;
  const shown = names.slice(0, 12).map((name) => JSON.stringify(name));
  return ` There are: ${shown.join(", ")}${names.length > 12 ? `, and ${names.length - 12} more` : ""}.`;
}

/** Edits (insert, delete, replace, swap of neighbours) between two texts. */
function edits(a: string, b: string): number {
  let older: number[] = [];
  let old = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      let cost = Math.min(row[j - 1]! + 1, old[j]! + 1, old[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1));
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        cost = Math.min(cost, older[j - 2]! + 1);
      row.push(cost);
    }
    older = old;
    old = row;
  }
  return old[b.length]!;
}
