import { type LinePoints, type Thinned, thin } from "./thin.js";

/**
 * A line over the rows of a time index, thinned to `bins` stretches: rows in order of time, broken wherever periods are
 * absent.
 */
export function timeLine(ordinals: ArrayLike<number>, values: ArrayLike<number>, bins?: number): Thinned {
  for (let i = 1; i < ordinals.length; i++) {
    if (ordinals[i]! < ordinals[i - 1]!) return sorted(ordinals, values, bins);
  }
  const few = thin({ x: ordinals, y: values }, bins, 1);
  return few.thinned ? few : { ...withGaps(few), from: few.from, thinned: false };
}

// A missing point wherever periods are absent.
function withGaps({ x, y }: LinePoints): { x: Float64Array; y: Float64Array } {
  const xs: number[] = [];
  const ys: number[] = [];
  for (let i = 0; i < x.length; i++) {
    if (i > 0 && x[i]! - x[i - 1]! > 1) {
      xs.push(x[i - 1]! + 1);
      ys.push(Number.NaN);
    }
    xs.push(x[i]!);
    ys.push(y[i]!);
  }
  return { x: Float64Array.from(xs), y: Float64Array.from(ys) };
}

// Rows out of order are the table's finding; a line of them is drawn all the same.
function sorted(ordinals: ArrayLike<number>, values: ArrayLike<number>, bins?: number): Thinned {
  const rows = Array.from({ length: ordinals.length }, (_, row) => row);
  rows.sort((a, b) => ordinals[a]! - ordinals[b]!);
  const [x, y] = [ordinals, values].map((column) => Float64Array.from(rows, (row) => column[row]!));
  return timeLine(x!, y!, bins);
}
