import { periodLabel, type TimeTable } from "../data/index.js";
import { refuseMissing } from "./missing.js";
import type { TermColumn } from "./term.js";

/** A period of the sample that is not used. */
export interface LeftOut {
  readonly ordinal: number;
  readonly reason: string;
  /** Labels of what is missing there; empty where a lag or lead reaches beyond the table. */
  readonly lacks: readonly string[];
}

/** The rows that can be used, and the periods of the sample that cannot. */
export interface Usable {
  readonly rows: Int32Array;
  readonly left: readonly LeftOut[];
  /** The columns that may hold an infinite value in a row that can be used. */
  readonly suspect: ReadonlySet<TermColumn>;
}

const beyond = 1;
const missing = 2;

/**
 * The rows of the table from `start` up to `end` in which no column is missing. Refuses values missing inside the
 * sample unless they may be left out.
 */
export function usableRows(
  table: TimeTable,
  columns: readonly TermColumn[],
  { start, end }: { start: number; end: number },
  leaveOut: boolean,
): Usable {
  const flags = new Uint8Array(end - start);
  const lacking = new Map<TermColumn, number[]>();
  const suspect = new Set<TermColumn>();
  const reaching: { column: TermColumn; count: number }[] = [];
  for (const column of columns) {
    const { values, edge } = column;
    if (allFinite(values, start, end)) continue;
    suspect.add(column);
    const inside: number[] = [];
    let count = 0;
    for (let row = start; row < end; row++) {
      if (!Number.isNaN(values[row]!)) continue;
      if (edge?.[row]) {
        flags[row - start]! |= beyond;
        count++;
      } else {
        flags[row - start]! |= missing;
        inside.push(row);
      }
    }
    if (inside.length > 0) lacking.set(column, inside);
    if (count > 0) reaching.push({ column, count });
  }
  if (lacking.size > 0 && !leaveOut) refuseMissing(table, lacking, { start, end });
  reaching.sort((a, b) => b.count - a.count);
  const left: LeftOut[] = [];
  const rows = new Int32Array(end - start);
  let used = 0;
  for (let row = start; row < end; row++) {
    const flag = flags[row - start]!;
    if (flag === 0) rows[used++] = row;
    else {
      const lacks = flag & missing ? lackedAt(lacking, row) : [];
      const reason =
        lacks.length === 0
          ? beyondReason(reaching, row, table)
          : `${listed(lacks)} ${lacks.length === 1 ? "is" : "are"} missing`;
      left.push({ ordinal: table.index.ordinals[row]!, reason, lacks });
    }
  }
  return { rows: rows.subarray(0, used), left, suspect };
}

// In one pass that does not branch, four sums wide: whatever is not finite leaves NaN in a sum.
function allFinite(values: Float64Array, start: number, end: number): boolean {
  let a = 0;
  let b = 0;
  let c = 0;
  let d = 0;
  let row = start;
  for (; row + 3 < end; row += 4) {
    a += values[row]! * 0;
    b += values[row + 1]! * 0;
    c += values[row + 2]! * 0;
    d += values[row + 3]! * 0;
  }
  for (; row < end; row++) a += values[row]! * 0;
  return a + b + c + d === 0;
}

function lackedAt(lacking: ReadonlyMap<TermColumn, readonly number[]>, row: number): string[] {
  return [...lacking.keys()]
    .filter(({ values, edge }) => Number.isNaN(values[row]!) && !edge?.[row])
    .map(({ label }) => label);
}

/** Labels, each once, the first three in full. */
export function listed(labels: readonly string[]): string {
  const each = [...new Set(labels)];
  return each.slice(0, 3).join(", ") + (each.length > 3 ? `, and ${each.length - 3} more` : "");
}

// Of several lags that reach beyond the table, the longest is the one that costs the period.
function beyondReason(
  reaching: readonly { column: TermColumn }[],
  row: number,
  { index }: TimeTable,
): string {
  const { column } = reaching.find(
    ({ column: { values, edge } }) => Number.isNaN(values[row]!) && edge?.[row],
  )!;
  const { ordinals } = index;
  const leading = column.edge!.indexOf(0);
  if (row < leading || leading === -1)
    return `${column.label} reaches back before ${periodLabel(index, ordinals[0]!)}`;
  return `${column.label} reaches beyond ${periodLabel(index, ordinals[ordinals.length - 1]!)}`;
}
