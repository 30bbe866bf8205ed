import type { Column } from "./column.js";
import type { Remark } from "./result.js";

/** Numbers that files put where nothing was measured. */
const usual = new Set([-9, -99, -999, -9999, -99_999, -999.25, 99, 999, 9_999, 99_999, 999_999, 1e20, -1e20]);

/**
 * Said of a column in which such a number stands at least twice at one end of its range, further from the other
 * values than these are from each other: it may stand for a missing value.
 */
export function sentinelFinding(column: Column): Remark[] {
  if (column.kind !== "number") return [];
  for (const end of ["low", "high"] as const) {
    const suspect = extreme(column.values, end);
    if (suspect === undefined || !usual.has(suspect)) continue;
    let [low, high, others, times] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, 0, 0];
    for (const value of column.values) {
      if (Number.isNaN(value)) continue;
      if (value === suspect) times++;
      else {
        others++;
        if (value < low) low = value;
        if (value > high) high = value;
      }
    }
    const away = end === "low" ? low - suspect : suspect - high;
    if (times < 2 || others < 3 || away <= high - low) continue;
    return [
      {
        severity: "caution",
        text:
          `${JSON.stringify(column.name)} is ${suspect} in ${times} rows and otherwise from ${low} to ${high}; ` +
          `if ${suspect} stands for a missing value, say missing: [..., "${suspect}"] when loading`,
      },
    ];
  }
  return [];
}

function extreme(values: Float64Array, end: "low" | "high"): number | undefined {
  let found: number | undefined;
  for (const value of values) {
    if (Number.isNaN(value)) continue;
    if (found === undefined || (end === "low" ? value < found : value > found)) found = value;
  }
  return found;
}
