import { countedSteps, periodLabel, type TimeTable } from "../data/index.js";
import { InputError } from "../numeric/index.js";
import type { TermColumn } from "./term.js";

/**
 * Refuses values that are missing inside the sample: which columns, in how many periods, where first, and the ways
 * out. A lag of a column that is itself missing is not counted again.
 */
export function refuseMissing(
  table: TimeTable,
  lacking: ReadonlyMap<TermColumn, readonly number[]>,
  { start, end }: { start: number; end: number },
): never {
  const plain = [...lacking.keys()].filter(({ label }) => table.has(label)).map(({ label }) => label);
  const named = [...lacking].filter(
    ([{ label, uses }]) => plain.includes(label) || !uses.some(({ column }) => plain.includes(column)),
  );
  const said = named
    .slice(0, 3)
    .map(([{ label }, rows]) => `${JSON.stringify(label)} is missing in ${places(table, rows, end - start)}`);
  if (named.length > 3) said.push(`and ${named.length - 3} more terms are missing in some`);
  const ways = [
    ...shorterSample(
      table,
      named.map(([, rows]) => rows),
      { start, end },
    ),
    'leave these periods out with missing: "leave out"',
    ...fillFirst(named.map(([column]) => column)),
  ];
  const list = `${ways.slice(0, -1).join(", ")}${ways.length > 1 ? ", or " : ""}${ways[ways.length - 1]}`;
  throw new InputError(
    `fit: ${said.join("; ")}.${gapText(table)} ${list[0]!.toUpperCase()}${list.slice(1)}.`,
  );
}

function places(table: TimeTable, rows: readonly number[], periods: number): string {
  const shown = rows
    .slice(0, 3)
    .map((row) => `${periodLabel(table.index, table.index.ordinals[row]!)}, row ${row + 1}`);
  return `${rows.length} of ${periods} periods (${rows.length > 3 ? "first " : ""}${shown.join("; ")})`;
}

function gapText({ index, T }: TimeTable): string {
  const absent = index.ordinals[T - 1]! - index.ordinals[0]! + 1 - T;
  if (absent === 0) return "";
  let row = 1;
  while (index.ordinals[row]! - index.ordinals[row - 1]! === 1) row++;
  const first = periodLabel(index, index.ordinals[row - 1]! + 1);
  return ` The table has no row for ${countedSteps(absent, index.step)} inside its span (first ${first}), and lags do not reach across.`;
}

/** Where values are missing at the ends of the sample only: the sample without them. */
function shorterSample(
  { index }: TimeTable,
  lacking: readonly (readonly number[])[],
  { start, end }: { start: number; end: number },
): string[] {
  let first = start;
  let last = end - 1;
  for (const rows of lacking) {
    let lead = 0;
    while (rows[lead] === start + lead) lead++;
    let tail = 0;
    while (tail < rows.length - lead && rows[rows.length - 1 - tail] === end - 1 - tail) tail++;
    if (lead + tail < rows.length) return [];
    first = Math.max(first, start + lead);
    last = Math.min(last, end - 1 - tail);
  }
  if (first >= last) return [];
  const name = (row: number) => JSON.stringify(periodLabel(index, index.ordinals[row]!));
  return [`shorten the sample with sample: [${name(first)}, ${name(last)}]`];
}

function fillFirst(columns: readonly TermColumn[]): string[] {
  const name = columns.flatMap(({ uses }) => uses.map(({ column }) => column))[0];
  return name === undefined ? [] : [`fill them first with .fill(${JSON.stringify(name)}, "linear")`];
}
