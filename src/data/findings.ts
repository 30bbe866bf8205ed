import { type Column, countMissing, isMissing } from "./column.js";
import type { Remark } from "./result.js";
import { countedSteps } from "./time/step.js";
import { periodLabel, type TimeIndex } from "./time/time-index.js";

/** A stretch of neighbouring rows or periods: its first and last ordinal, both included. */
export interface Stretch {
  readonly first: number;
  readonly last: number;
}

/** The stretches of periods that no row stands for, inside the span. */
export function gapsOf(index: TimeIndex): Stretch[] {
  const gaps: Stretch[] = [];
  const ordered = index.ordinals.every((ordinal, i, all) => i === 0 || ordinal >= all[i - 1]!);
  const ordinals = ordered ? index.ordinals : Float64Array.from(index.ordinals).sort();
  for (let i = 1; i < ordinals.length; i++) {
    if (ordinals[i]! - ordinals[i - 1]! > 1)
      gaps.push({ first: ordinals[i - 1]! + 1, last: ordinals[i]! - 1 });
  }
  return gaps;
}

/** The stretches of rows in which a column is missing, as ordinals. */
export function missingStretches(column: Column, index: TimeIndex): Stretch[] {
  const stretches: Stretch[] = [];
  const { ordinals } = index;
  for (let i = 0; i < ordinals.length; i++) {
    if (!isMissing(column, i)) continue;
    const start = i;
    while (i + 1 < ordinals.length && isMissing(column, i + 1)) i++;
    stretches.push({ first: ordinals[start]!, last: ordinals[i]! });
  }
  return stretches;
}

/** What a careful reader of the table must know: gaps, uneven steps, missing values, columns that start late or end early. */
export function findingsOf(index: TimeIndex, columns: readonly Column[]): Remark[] {
  const label = (ordinal: number) => periodLabel(index, ordinal);
  const findings: Remark[] = [];
  const gaps = gapsOf(index);
  if (gaps.length > 0) {
    const missing = gaps.reduce((sum, gap) => sum + gap.last - gap.first + 1, 0);
    const share = gaps.length / Math.max(1, index.ordinals.length - 1);
    findings.push({
      severity: "caution",
      text:
        `${countedSteps(missing, index.step)} ${missing === 1 ? "is" : "are"} absent in ${gaps.length} ` +
        `${gaps.length === 1 ? "gap" : "gaps"}, first ${label(gaps[0]!.first)}` +
        (share > 0.2
          ? "; the steps are mixed, so state the step with every, or bring the rows to one step"
          : ""),
    });
  }
  for (const column of columns) findings.push(...columnFindings(column, index, label));
  return findings;
}

function columnFindings(column: Column, index: TimeIndex, label: (ordinal: number) => string): Remark[] {
  const T = index.ordinals.length;
  const missing = countMissing(column);
  if (missing === 0) return [];
  const name = JSON.stringify(column.name);
  if (missing === T) return [{ severity: "caution", text: `${name} is missing throughout` }];
  const findings: Remark[] = [];
  let lead = 0;
  while (isMissing(column, lead)) lead++;
  let trail = 0;
  while (isMissing(column, T - 1 - trail)) trail++;
  if (lead > 0)
    findings.push({ severity: "note", text: `${name} begins only in ${label(index.ordinals[lead]!)}` });
  if (trail > 0) {
    findings.push({
      severity: "note",
      text: `${name} ends already in ${label(index.ordinals[T - 1 - trail]!)}`,
    });
  }
  const inside = missing - lead - trail;
  if (inside > 0) {
    let first = lead;
    while (!isMissing(column, first)) first++;
    findings.push({
      severity: "caution",
      text: `${name} is missing in ${inside} of ${T} rows inside its span, first ${label(index.ordinals[first]!)}`,
    });
  }
  return findings;
}
