/** The middle value. */
export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
}

/** Seconds that one call takes. */
export async function seconds(work: () => unknown): Promise<number> {
  const start = performance.now();
  await work();
  return (performance.now() - start) / 1000;
}

/**
 * Median seconds of several things to do, which take turns: what else the machine does hits them alike. A first round
 * is not counted. Each gives its own seconds, or undefined where it cannot be had.
 */
export async function inTurns(
  runs: number,
  ...works: (() => Promise<number | undefined>)[]
): Promise<(number | undefined)[]> {
  const times = works.map(() => [] as number[]);
  for (let run = 0; run <= runs; run++) {
    for (let i = 0; i < works.length; i++) {
      const time = await works[i]!();
      if (run > 0 && time !== undefined) times[i]!.push(time);
    }
  }
  return times.map((each) => (each.length ? median(each) : undefined));
}
