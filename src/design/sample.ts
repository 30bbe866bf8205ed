import { parsePeriod, parsePeriodEnd, spanText, type TimeTable } from "../data/index.js";
import { InputError } from "../numeric/index.js";

/** First and last period used, both included; either may be null for the table's own end. */
export type Sample = readonly [from: string | number | null, to: string | number | null];

/** The rows of a regular table within a sample: from `start` up to but not including `end`. */
export function sampleRows(table: TimeTable, sample: Sample | undefined): { start: number; end: number } {
  if (sample === undefined) return { start: 0, end: table.T };
  if (!Array.isArray(sample) || sample.length !== 2) {
    throw new InputError(
      'fit: sample is a first and a last period, such as sample: ["2019-W01", "2021-W52"]; null leaves an end open.',
    );
  }
  const { ordinals } = table.index;
  const [from, to] = sample as Sample;
  const first = bound(table, from, parsePeriod, Number.NEGATIVE_INFINITY);
  const last = bound(table, to, parsePeriodEnd, Number.POSITIVE_INFINITY);
  let start = 0;
  while (start < table.T && ordinals[start]! < first) start++;
  let end = table.T;
  while (end > start && ordinals[end - 1]! > last) end--;
  if (end > start) return { start, end };
  const order = first > last ? " Its first period comes after its last." : "";
  throw new InputError(
    `fit: no period lies in the sample ${from ?? "start"} to ${to ?? "end"}; the table spans ${spanText(table.index)}.${order}`,
  );
}

function bound(
  table: TimeTable,
  at: string | number | null | undefined,
  parse: typeof parsePeriod,
  open: number,
): number {
  if (at === null || at === undefined) return open;
  try {
    return parse(table.index, at);
  } catch (error) {
    if (error instanceof InputError) throw new InputError(`fit: sample: ${error.message}.`);
    throw error;
  }
}
