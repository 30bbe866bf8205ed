import { type Column, countFilled, countMissing, isMissing } from "./column.js";
import type { Remark } from "./result.js";
import { sentinelFinding } from "./sentinels.js";
import { countedSteps, stepName } from "./time/step.js";
import { periodLabel, type TimeIndex } from "./time/time-index.js";

/** A stretch of neighbouring rows or periods: its first and last ordinal, both included. */
export interface Stretch {
  readonly first: number;
  readonly last: number;
}

/** The stretches of periods that no row stands for, inside the span. */
export function gapsOf(index: TimeIndex): Stretch[] {
  const gaps: Stretch[] = [];
  const ordinals = inOrder(index.ordinals);
  for (let i = 1; i < ordinals.length; i++) {
    if (ordinals[i]! - ordinals[i - 1]! > 1)
      gaps.push({ first: ordinals[i - 1]! + 1, last: ordinals[i]! - 1 });
  }
  return gaps;
}

function inOrder(ordinals: Float64Array): Float64Array {
  for (let i = 1; i < ordinals.length; i++) {
    if (ordinals[i]! < ordinals[i - 1]!) return Float64Array.from(ordinals).sort();
  }
  return ordinals;
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

/**
 * What a careful reader of the table must know: gaps, mixed steps, columns that start late or end early, missing and
 * filled values, values that look like markers of missing ones.
 */
export function findingsOf(index: TimeIndex, columns: readonly Column[]): Remark[] {
  const label = (ordinal: number) => periodLabel(index, ordinal);
  return [...gapFindings(index, label), ...columns.flatMap((column) => columnFindings(column, index, label))];
}

function gapFindings(index: TimeIndex, label: (ordinal: number) => string): Remark[] {
  const gaps = gapsOf(index);
  if (gaps.length === 0) return [];
  const missing = gaps.reduce((sum, gap) => sum + gap.last - gap.first + 1, 0);
  const text =
    `${countedSteps(missing, index.step)} ${missing === 1 ? "is" : "are"} absent in ${gaps.length} ` +
    `${gaps.length === 1 ? "gap" : "gaps"}, first ${label(gaps[0]!.first)}`;
  const mixed = mixedSteps(index, label);
  return [{ severity: "caution", text }, ...(mixed ? [mixed] : [])];
}

/** Said when most rows are further apart than the step, which a few rows that stand closer have made so small. */
function mixedSteps(index: TimeIndex, label: (ordinal: number) => string): Remark | undefined {
  const ordinals = inOrder(index.ordinals);
  const counts = new Map<number, number>();
  for (let i = 1; i < ordinals.length; i++) {
    const apart = ordinals[i]! - ordinals[i - 1]!;
    if (apart > 0) counts.set(apart, (counts.get(apart) ?? 0) + 1);
  }
  const [usual] = [...counts].reduce((a, b) => (b[1] > a[1] ? b : a), [1, 0]);
  if (usual === 1) return undefined;
  let at = 1;
  while (ordinals[at]! - ordinals[at - 1]! === usual) at++;
  return {
    severity: "caution",
    text:
      `steps are mixed: rows are usually ${usual} steps of one ${stepName(index.step)} apart, but not ${label(ordinals[at - 1]!)} and ` +
      `${label(ordinals[at]!)}. State the step with every, or bring the rows to one step with .to`,
  };
}

function columnFindings(column: Column, index: TimeIndex, label: (ordinal: number) => string): Remark[] {
  const T = index.ordinals.length;
  const missing = countMissing(column);
  const filled = countFilled(column);
  const name = JSON.stringify(column.name);
  const findings: Remark[] = [];
  if (filled > 0) {
    const values = `${filled} ${filled === 1 ? "value" : "values"}`;
    findings.push({ severity: "note", text: `${values} of ${name} were filled in, not observed` });
  }
  findings.push(...sentinelFinding(column));
  if (missing === 0) return findings;
  if (missing === T) return [...findings, { severity: "caution", text: `${name} is missing throughout` }];
  if (column.kind === "text" && 2 * missing > T) {
    return [...findings, { severity: "note", text: `${name} is missing in ${missing} of ${T} rows` }];
  }
  let lead = 0;
  while (isMissing(column, lead)) lead++;
  let trail = 0;
  while (isMissing(column, T - 1 - trail)) trail++;
  const at = (row: number) => label(index.ordinals[row]!);
  if (lead > 0) findings.push({ severity: "note", text: `${name} begins only in ${at(lead)}` });
  if (trail > 0) findings.push({ severity: "note", text: `${name} ends already in ${at(T - 1 - trail)}` });
  const inside = missing - lead - trail;
  if (inside > 0) {
    let first = lead;
    while (!isMissing(column, first)) first++;
    findings.push({
      severity: "caution",
      text: `${name} is missing in ${inside} of ${T} rows inside its span, first ${at(first)}`,
    });
  }
  return findings;
}
