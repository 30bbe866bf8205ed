import { periodLabel, type TimeTable } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";

/** What the tests of integration need of a table. */
export type SeriesSource = Pick<TimeTable, "index" | "numbers">;

/** The values of some columns over the unbroken stretch of periods in which all are there. */
export interface Stretch {
  readonly values: readonly Float64Array[];
  readonly ordinals: Float64Array;
  /** Periods left off at either end because a column is missing there. */
  readonly trimmed: number;
}

/**
 * Columns over the periods from the first to the last in which all are known. Refuses a missing value or a missing period in
 * between, naming the first: lags across a gap are not lags.
 */
export function unbroken(table: SeriesSource, columns: readonly string[], caller: string): Stretch {
  const all = columns.map((name) => table.numbers(name));
  const { ordinals } = table.index;
  const T = ordinals.length;
  const known = (t: number) => all.every((values) => Number.isFinite(values[t]!));
  let first = 0;
  while (first < T && !known(first)) first++;
  let last = T - 1;
  while (last > first && !known(last)) last--;
  if (first >= T)
    throw new InputError(
      `${caller}: ${columns.map((c) => JSON.stringify(c)).join(", ")} have no period in which all are known.`,
    );
  for (let t = first; t <= last; t++) {
    if (!known(t)) {
      const which = columns.find((_, i) => !Number.isFinite(all[i]![t]!))!;
      throw new InputError(
        `${caller}: ${JSON.stringify(which)} is missing in ${periodLabel(table.index, ordinals[t]!)}. Fill it with ` +
          `.fill(${JSON.stringify(which)}, ...), or take an unbroken stretch with .between(...).`,
      );
    }
    if (t > first && ordinals[t]! - ordinals[t - 1]! !== 1)
      throw new InputError(
        `${caller}: no row between ${periodLabel(table.index, ordinals[t - 1]!)} and ${periodLabel(table.index, ordinals[t]!)}. ` +
          `Take an unbroken stretch with .between(...), or a coarser step with .to(...).`,
      );
  }
  return {
    values: all.map((values) => values.slice(first, last + 1)),
    ordinals: ordinals.slice(first, last + 1),
    trimmed: first + (T - 1 - last),
  };
}
