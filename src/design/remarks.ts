import { countedSteps, type Remark, type TimeTable } from "../data/index.js";
import type { TermColumn } from "./term.js";
import { type LeftOut, listed } from "./usable.js";

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
  const reasons = new Map<string, number>();
  for (const { reason, lacks } of left)
    if (lacks.length === 0) reasons.set(reason, (reasons.get(reason) ?? 0) + 1);
  const remarks = [...reasons].map(
    ([reason, count]): Remark => ({
      severity: "note",
      text: `${countedSteps(count, step)} left out: ${reason}`,
    }),
  );
  const missing = left.filter(({ lacks }) => lacks.length > 0);
  if (missing.length === 0) return remarks;
  const same = missing.every(({ reason }) => reason === missing[0]!.reason);
  const why = same
    ? missing[0]!.reason
    : `${listed(missing.flatMap(({ lacks }) => lacks))} are missing in some`;
  remarks.push({ severity: "caution", text: `${countedSteps(missing.length, step)} left out: ${why}` });
  return remarks;
}

function gapText({ index: { ordinals, step } }: TimeTable, rows: Int32Array): string | undefined {
  const first = rows[0]!;
  const last = rows[rows.length - 1]!;
  const absent = ordinals[last]! - ordinals[first]! - (last - first);
  if (absent === 0) return undefined;
  return `${countedSteps(absent, step)} inside the sample ${absent === 1 ? "is" : "are"} not in the table`;
}
