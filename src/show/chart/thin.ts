/** Points of a line in the order of x; NaN in y breaks the line. */
export interface LinePoints {
  readonly x: ArrayLike<number>;
  readonly y: ArrayLike<number>;
}

/** What is left of a line for drawing. */
export interface Thinned {
  readonly x: Float64Array;
  readonly y: Float64Array;
  /** Points there were. */
  readonly from: number;
  /** Whether points were left out. */
  readonly thinned: boolean;
}

/**
 * Leaves out points that a picture could not tell: of each of `bins` equal stretches of x the first, lowest, highest and
 * last point stay (Jugel et al. 2014, "M4"), and a missing one if there is any, so that a line of one pixel per
 * stretch is drawn as all points would draw it.
 *
 * @param widest x may rise by so much from one point to the next; beyond that the line breaks. Default: never.
 */
export function thin(points: LinePoints, bins = 500, widest = Number.POSITIVE_INFINITY): Thinned {
  const { x, y } = points;
  const n = x.length;
  if (n <= 4 * bins) return { x: Float64Array.from(x), y: Float64Array.from(y), from: n, thinned: false };
  const xs: number[] = [];
  const ys: number[] = [];
  const keep = (at: number, value: number) => {
    xs.push(at);
    ys.push(value);
  };
  const start = x[0]!;
  const width = (x[n - 1]! - start) / bins;
  let i = 0;
  for (let bin = 0; bin < bins && i < n; bin++) {
    const end = bin === bins - 1 ? Number.POSITIVE_INFINITY : start + (bin + 1) * width;
    const first = i;
    let [low, high] = [-1, -1];
    let hole = Number.NaN;
    for (; i < n && x[i]! < end; i++) {
      const value = y[i]!;
      if (i > 0 && x[i]! - x[i - 1]! > widest) hole = x[i - 1]! + widest / 2;
      if (Number.isNaN(value)) {
        hole = x[i]!;
        continue;
      }
      if (low === -1 || value < y[low]!) low = i;
      if (high === -1 || value > y[high]!) high = i;
    }
    if (i === first) continue;
    const stay = [...new Set([first, low, high, i - 1])].filter((at) => at >= 0 && x[at] !== hole);
    const before = stay.filter((at) => !(x[at]! > hole)).sort((a, b) => a - b);
    const after = stay.filter((at) => x[at]! > hole).sort((a, b) => a - b);
    for (const at of before) keep(x[at]!, y[at]!);
    if (!Number.isNaN(hole)) keep(hole, Number.NaN);
    for (const at of after) keep(x[at]!, y[at]!);
  }
  return { x: Float64Array.from(xs), y: Float64Array.from(ys), from: n, thinned: true };
}
