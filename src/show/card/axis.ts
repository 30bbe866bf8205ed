/** A horizontal axis in percent of its width. */
export interface Axis {
  readonly from: number;
  readonly to: number;
  /** Round numbers inside, at most four, with zero among them where it is inside. */
  readonly ticks: readonly number[];
  /** Where a value stands, in percent from the left; not clipped. */
  position(x: number): number;
}

/**
 * The axis on which all of some intervals fit. Zero is on it unless it lies further from all of them than `reach` times
 * their span (default: always on it).
 */
export function axisFor(
  intervals: readonly { readonly low: number; readonly high: number }[],
  reach = Number.POSITIVE_INFINITY,
): Axis {
  let from = Number.POSITIVE_INFINITY;
  let to = Number.NEGATIVE_INFINITY;
  for (const { low, high } of intervals) {
    if (Number.isFinite(low)) from = Math.min(from, low);
    if (Number.isFinite(high)) to = Math.max(to, high);
  }
  if (!(from <= to)) [from, to] = [-1, 1];
  const away = Math.max(0, from, -to);
  if (away <= reach * (to - from) || from === to) {
    from = Math.min(0, from);
    to = Math.max(0, to);
  }
  if (from === to) [from, to] = [-1, 1];
  // Room at both ends for the points and for the figures on the ticks.
  const margin = 0.06 * (to - from);
  const [start, end] = [from - margin, to + margin];
  let step = roundStep((to - from) / 3);
  let ticks = multiples(step, from, to);
  // Zero alone gives no measure.
  if (ticks.length < 2) {
    step /= 2;
    ticks = multiples(step, from, to);
  }
  return { from: start, to: end, ticks, position: (x) => (100 * (x - start)) / (end - start) };
}

function multiples(step: number, from: number, to: number): number[] {
  const found: number[] = [];
  for (let n = Math.ceil(from / step - 1e-9); n * step <= to + 1e-9 * step; n++) {
    found.push(Number((n * step).toPrecision(12)) + 0);
  }
  return found;
}

/** The smallest of 1, 2, 2.5, 5 times a power of ten that is at least a given width. */
export function roundStep(width: number): number {
  const power = 10 ** Math.floor(Math.log10(width));
  const lead = width / power;
  return (lead > 5 ? 10 : lead > 2.5 ? 5 : lead > 2 ? 2.5 : lead > 1 ? 2 : 1) * power;
}
