/** One series of a table. */
export type Column = NumberColumn | TextColumn;

/** Numbers (missing: NaN) or truth values (0, 1, missing: NaN), one per row. */
export interface NumberColumn {
  readonly name: string;
  readonly kind: "number" | "boolean";
  readonly values: Float64Array;
  /** 1 where a value was filled in and not observed. */
  readonly filled?: Uint8Array;
}

/** Texts (missing: null), one per row. */
export interface TextColumn {
  readonly name: string;
  readonly kind: "text";
  readonly values: readonly (string | null)[];
  readonly filled?: Uint8Array;
}

/** Whether row `i` of a column is missing. */
export function isMissing(column: Column, i: number): boolean {
  return column.kind === "text" ? column.values[i] === null : Number.isNaN(column.values[i]!);
}

/** Number of missing rows. */
export function countMissing(column: Column): number {
  let count = 0;
  for (let i = 0; i < column.values.length; i++) if (isMissing(column, i)) count++;
  return count;
}

/** Number of rows that were filled in. */
export function countFilled(column: Column): number {
  return column.filled?.reduce((sum, flag) => sum + flag, 0) ?? 0;
}

/** The rows `rows` of a column, in that order. */
export function pickRows(column: Column, rows: ArrayLike<number>): Column {
  const filled = column.filled ? pickFlags(column.filled, rows) : undefined;
  const flags = filled?.includes(1) ? { filled } : {};
  if (column.kind === "text") {
    const values: (string | null)[] = [];
    for (let i = 0; i < rows.length; i++) values.push(column.values[rows[i]!]!);
    return { name: column.name, kind: "text", values, ...flags };
  }
  return { name: column.name, kind: column.kind, values: pickNumbers(column.values, rows), ...flags };
}

/** The numbers at `rows`; a plain loop, which on a million rows takes a tenth of the time of `from` with a function. */
export function pickNumbers(values: Float64Array, rows: ArrayLike<number>): Float64Array {
  const picked = new Float64Array(rows.length);
  for (let i = 0; i < rows.length; i++) picked[i] = values[rows[i]!]!;
  return picked;
}

function pickFlags(flags: Uint8Array, rows: ArrayLike<number>): Uint8Array {
  const picked = new Uint8Array(rows.length);
  for (let i = 0; i < rows.length; i++) picked[i] = flags[rows[i]!]!;
  return picked;
}
