import type { LinePoints } from "./thin.js";

/**
 * The points of a line over the rows of a time index: in order of time, and with a missing one wherever periods are absent,
 * which breaks the line there.
 */
export function withGaps(ordinals: ArrayLike<number>, values: ArrayLike<number>): LinePoints {
  const x: number[] = [];
  const y: number[] = [];
  const order = inOrder(ordinals);
  let before = Number.NaN;
  for (let n = 0; n < ordinals.length; n++) {
    const i = order ? order[n]! : n;
    const at = ordinals[i]!;
    if (at - before > 1) {
      x.push(before + 1);
      y.push(Number.NaN);
    }
    x.push(at);
    y.push(values[i]!);
    before = at;
  }
  return { x, y };
}

// Rows out of order are the table's finding; a line of them is drawn all the same.
function inOrder(ordinals: ArrayLike<number>): number[] | undefined {
  for (let i = 1; i < ordinals.length; i++) {
    if (ordinals[i]! < ordinals[i - 1]!) {
      return Array.from({ length: ordinals.length }, (_, row) => row).sort(
        (a, b) => ordinals[a]! - ordinals[b]!,
      );
    }
  }
  return undefined;
}
