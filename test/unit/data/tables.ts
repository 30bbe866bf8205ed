import { load, type TimeTable } from "../../../src/data/index.js";

/** A table of one column `x` (and `y` = 10x) over the given periods; null is missing. */
export function table(periods: readonly string[], x: readonly (number | null)[]): Promise<TimeTable> {
  return load(
    periods.map((t, i) => ({ t, x: x[i] ?? null, y: x[i] === null ? null : 10 * x[i]! })),
    { time: "t", asFound: true },
  );
}

/** `count` months from January 2020, x = 1, 2, 3, ... */
export function months(count: number, x: (i: number) => number | null = (i) => i + 1): Promise<TimeTable> {
  const names = Array.from({ length: count }, (_, i) => {
    const month = String((i % 12) + 1).padStart(2, "0");
    return `${2020 + Math.floor(i / 12)}-${month}`;
  });
  return table(
    names,
    names.map((_, i) => x(i)),
  );
}
