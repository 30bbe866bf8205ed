import { countedSteps, type Remark, type TimeTable } from "../data/index.js";
import type { TermColumn } from "./term.js";
import type { LeftOut } from "./usable.js";

/** What a card must say about how a design came about. */
export function designRemarks(
  table: TimeTable,
  columns: readonly TermColumn[],
  rows: Int32Array,
  left: readonly LeftOut[],
  filled: number,
): Remark[] {
  const { step } = table.index;
  const remarks: Remark[] = leftOutRemarks(left, step);
  const gap = gapText(table, rows);
  if (gap) remarks.push({ severity: "caution", text: gap });
  if (filled > 0) {
    const names = [
      ...new Set(columns.filter((c) => c.filled).flatMap(({ uses }) => uses.map((u) => u.column))),
    ]
      .filter((name) => table.column(name).filled)
      .join(", ");
    remarks.push({
      severity: "caution",
      text: `${countedSteps(filled, step)} of those used ${filled === 1 ? "rests" : "rest"} on values that were filled in, not observed (${names})`,
    });
  }
  const notes = new Set(columns.flatMap(({ note }) => (note === undefined ? [] : [note])));
  if (notes.size > 0) remarks.push({ severity: "note", text: [...notes].join("; ") });
  return remarks;
}

function leftOutRemarks(left: readonly LeftOut[], step: TimeTable["index"]["step"]): Remark[] {
  const reasons = new Map<string, LeftOut[]>();
  for (const one of left) {
    const same = reasons.get(one.reason);
    if (same) same.push(one);
    else reasons.set(one.reason, [one]);
  }
  return [...reasons].map(([reason, periods]) => ({
    severity: periods[0]!.missing ? "caution" : "note",
    text: `${countedSteps(periods.length, step)} left out: ${reason}`,
  }));
}

function gapText({ index: { ordinals, step } }: TimeTable, rows: Int32Array): string | undefined {
  const first = rows[0]!;
  const last = rows[rows.length - 1]!;
  const unused = ordinals[last]! - ordinals[first]! + 1 - rows.length;
  if (unused === 0) return undefined;
  const absent = ordinals[last]! - ordinals[first]! - (last - first);
  const which =
    absent === 0
      ? `${countedSteps(unused, step)} inside the sample ${unused === 1 ? "is" : "are"} left out`
      : `${countedSteps(absent, step)} inside the sample ${absent === 1 ? "is" : "are"} not in the table` +
        (unused > absent
          ? ` and ${unused - absent} more ${unused - absent === 1 ? "is" : "are"} left out`
          : "");
  return `${which}; lagged products are taken in time, never across the gap`;
}
