import { formOf } from "../../time/forms.js";

/** A written form of times that DuckDB converts itself. */
export interface TimePattern {
  readonly form: "date" | "date-time" | "integer";
  readonly offset: boolean;
  /** SQL for the milliseconds (the whole number) of a text column, NaN where it is not in this form; and for its wall clock when there is an offset. */
  select(column: string): string[];
}

const day = "\\d{4}-\\d{2}-\\d{2}";
const clock = "[T ]([01]\\d|2[0-3]):[0-5]\\d(:[0-5]\\d(\\.\\d{1,3}0{0,3})?)?";

/** The pattern that the first rows are written in, when it is one that DuckDB reads fast. */
export function timePattern(sample: readonly string[]): TimePattern | undefined {
  const first = sample[0] ?? "";
  const form = formOf(first);
  if (form === "date") {
    return {
      form,
      offset: false,
      select: (column) => [matching(column, day, `epoch_ms(CAST(TRY_CAST(${column} AS DATE) AS TIMESTAMP))`)],
    };
  }
  if (form === "year" || form === "integer") {
    return {
      form: "integer",
      offset: false,
      select: (column) => [matching(column, "[+-]?\\d{1,15}", column)],
    };
  }
  if (form !== "date-time") return undefined;
  if (!/(Z|[+-]\d\d:\d\d)$/.test(first)) {
    return {
      form,
      offset: false,
      select: (column) => [matching(column, day + clock, `epoch_ms(TRY_CAST(${column} AS TIMESTAMP))`)],
    };
  }
  const zoned = `${day}${clock}(Z|[+-](0\\d|1[0-4]):[0-5]\\d)`;
  return {
    form,
    offset: true,
    select: (column) => [
      matching(column, zoned, `epoch_ms(TRY_CAST(${column} AS TIMESTAMPTZ))`),
      matching(
        column,
        zoned,
        `epoch_ms(TRY_CAST(regexp_replace(${column}, '(Z|[+-]\\d\\d:\\d\\d)$', '') AS TIMESTAMP))`,
      ),
    ],
  };
}

function matching(column: string, pattern: string, milliseconds: string): string {
  return `CASE WHEN regexp_full_match(${column}, '${pattern}') THEN coalesce(CAST(${milliseconds} AS DOUBLE), 'nan'::DOUBLE) ELSE 'nan'::DOUBLE END`;
}
