import { InputError } from "../numeric/index.js";
import type { Remark } from "./result.js";
import { periodLabel, type TimeIndex } from "./time/time-index.js";

/** The first row (0-based) that comes before its predecessor in time, or −1. */
export function firstUnsorted(index: TimeIndex): number {
  const { ordinals } = index;
  for (let i = 1; i < ordinals.length; i++) if (ordinals[i]! < ordinals[i - 1]!) return i;
  return -1;
}

/** Periods that more than one row stands for, with the rows (0-based), in order of time. */
export function duplicatesOf(index: TimeIndex): { ordinal: number; rows: number[] }[] {
  const { ordinals } = index;
  let strictly = true;
  for (let i = 1; i < ordinals.length && strictly; i++) strictly = ordinals[i]! > ordinals[i - 1]!;
  if (strictly) return [];
  const rows = new Map<number, number[]>();
  ordinals.forEach((ordinal, row) => {
    const list = rows.get(ordinal);
    if (list) list.push(row);
    else rows.set(ordinal, [row]);
  });
  return [...rows]
    .filter(([, list]) => list.length > 1)
    .map(([ordinal, list]) => ({ ordinal, rows: list }))
    .sort((a, b) => a.ordinal - b.ordinal);
}

/** Unsorted rows and doubled periods in words, each with the way out. */
export function irregularities(index: TimeIndex): Remark[] {
  const findings: Remark[] = [];
  const unsorted = firstUnsorted(index);
  if (unsorted >= 0) {
    const label = (row: number) => periodLabel(index, index.ordinals[row]!);
    findings.push({
      severity: "caution",
      text:
        `rows are not in order of time: row ${unsorted + 1} (${label(unsorted)}) comes after row ${unsorted} ` +
        `(${label(unsorted - 1)}). Sort them with .sort()`,
    });
  }
  const duplicates = duplicatesOf(index);
  if (duplicates.length > 0) {
    const { ordinal, rows } = duplicates[0]!;
    const others =
      duplicates.length > 1
        ? ` (and ${duplicates.length - 1} more such ${duplicates.length === 2 ? "period" : "periods"})`
        : "";
    findings.push({
      severity: "caution",
      text:
        `rows ${listRows(rows)} ${rows.length === 2 ? "both" : "all"} stand for ${periodLabel(index, ordinal)}${others}. ` +
        `Make them one with .dedupe("identical"), .dedupe("first"), .dedupe("last") or .dedupe("mean")`,
    });
  }
  return findings;
}

/** `8 and 9`, `3, 7 and 12`: 0-based rows as the reader counts them. */
export function listRows(rows: readonly number[]): string {
  const numbers = rows.map((row) => row + 1);
  return `${numbers.slice(0, -1).join(", ")} and ${numbers[numbers.length - 1]}`;
}

/** Refuses, in the name of what was asked, a table whose rows are unsorted or doubled. */
export function requireRegular(index: TimeIndex, asked: string): void {
  const [first] = irregularities(index);
  if (first) throw new InputError(`${asked}: ${first.text}.`);
}
