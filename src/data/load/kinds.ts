import type { Dialect } from "./dialect.js";

/** How the numbers of a file are written. */
export interface NumberStyle {
  readonly decimal: "." | ",";
  readonly thousands: string | undefined;
  /** Whether a field is a number in this style. */
  accepts(field: string): boolean;
}

/** What each column of a delimited file holds. */
export interface Kinds {
  /** DuckDB types: `DOUBLE` or `VARCHAR`. */
  readonly types: readonly ("DOUBLE" | "VARCHAR")[];
  readonly booleans: readonly boolean[];
  readonly style: NumberStyle;
}

const plain = /^\s*[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?\s*$/i;
const infinite = /^\s*[+-]?inf(inity)?\s*$/i;
const commaDecimal = /^\s*[+-]?(\d{1,3}(\.\d{3})+|\d+),\d+(e[+-]?\d+)?\s*$/i;
const commaThousands = /^\s*[+-]?\d{1,3}(,\d{3})+(\.\d+)?\s*$/;
const pointThousands = /^\s*[+-]?\d{1,3}(\.\d{3})+(,\d+)?\s*$/;

/**
 * Decides from the first rows what each column holds. A column most of whose values are numbers is a column of
 * numbers, and a cell that is none is then an error; it is never turned into text unsaid. `text` stay as they are.
 */
export function kindsOf(dialect: Dialect, missing: readonly string[], text: readonly string[]): Kinds {
  const columns = dialect.header.map((name, i) => ({
    name,
    values: dialect.sample.map((row) => row[i] ?? "").filter((field) => !missing.includes(field)),
  }));
  const style = styleOf(columns.filter(({ name }) => !text.includes(name)).map(({ values }) => values));
  const booleans = columns.map(
    ({ name, values }) =>
      !text.includes(name) && values.length > 0 && values.every((field) => /^(true|false)$/i.test(field)),
  );
  const types = columns.map(({ name, values }, i) => {
    if (booleans[i] || text.includes(name)) return "VARCHAR" as const;
    const numbers = values.filter((field) => style.accepts(field)).length;
    return numbers > 0 && numbers >= values.length / 2 ? ("DOUBLE" as const) : ("VARCHAR" as const);
  });
  return { types, booleans, style };
}

function styleOf(columns: readonly (readonly string[])[]): NumberStyle {
  let points = 0;
  let commas = 0;
  let thousands = 0;
  for (const field of columns.flat()) {
    if (plain.test(field) && field.includes(".")) points++;
    else if (commaThousands.test(field) && (field.includes(".") || (field.match(/,/g)?.length ?? 0) > 1))
      thousands++;
    else if (commaDecimal.test(field)) commas++;
  }
  if (thousands > 0 && thousands + points >= commas) {
    return {
      decimal: ".",
      thousands: ",",
      accepts: (field) => plain.test(field) || infinite.test(field) || commaThousands.test(field),
    };
  }
  if (commas > points) {
    const grouped = columns.flat().some((field) => commaDecimal.test(field) && field.includes("."));
    return {
      decimal: ",",
      thousands: grouped ? "." : undefined,
      accepts: (field) =>
        infinite.test(field) ||
        plain.test(field.replace(",", ".")) ||
        (grouped && pointThousands.test(field)),
    };
  }
  return {
    decimal: ".",
    thousands: undefined,
    accepts: (field) => plain.test(field) || infinite.test(field),
  };
}
