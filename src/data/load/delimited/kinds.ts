import type { LoadOptions } from "../options.js";
import type { Dialect } from "./dialect.js";
import { type NumberStyle, numberStyle, styleOf } from "./number-style.js";

/** What a column of a delimited file holds; `undecided` when the first rows are all blank. */
export type Kind = "number" | "boolean" | "text" | "time" | "undecided";

/** What the columns of a delimited file hold and how its numbers are written. */
export interface Kinds {
  readonly kinds: readonly Kind[];
  readonly style: NumberStyle;
}

/** The kind of a column from some of its values, missing ones left out. */
export function kindOf(values: readonly string[], style: NumberStyle): Kind {
  if (values.length === 0) return "undecided";
  if (values.every((text) => /^(true|false)$/i.test(text))) return "boolean";
  const others = values.filter((text) => Number.isNaN(style.read(text)));
  const numbers = values.length - others.length;
  if (others.length === 0) return "number";
  // A few texts among numbers are bad cells or unknown markers of missing values, to be named and not swallowed by
  // turning the column into text.
  const fewTexts = numbers > 0 && new Set(others).size <= 3 && new Set(others).size < numbers;
  return 2 * numbers >= values.length || fewTexts ? "number" : "text";
}

/** Decides from the first rows what each column holds. Columns named in `text` stay text. */
export function kindsOf(
  dialect: Dialect,
  options: LoadOptions,
  missing: ReadonlySet<string>,
  file: string,
): Kinds {
  const columns = dialect.header.map((name, i) => ({
    name,
    isText: options.text?.includes(name) ?? false,
    values: dialect.sample.map((row) => row[i] ?? "").filter((field) => !missing.has(field.trim())),
  }));
  const open = columns.filter(({ name, isText }) => !isText && name !== options.time);
  const anyStyle = [
    numberStyle("."),
    numberStyle(".", ","),
    numberStyle(",", "."),
    numberStyle(",", " "),
    numberStyle(".", " "),
    numberStyle(",", "'"),
    numberStyle(".", "'"),
  ];
  const numberLike = open.filter(
    ({ values }) =>
      2 * values.filter((field) => anyStyle.some((style) => !Number.isNaN(style.read(field)))).length >=
      values.length,
  );
  const style = styleOf(
    numberLike.flatMap(({ values }) => values),
    options,
    file,
  );
  const kinds = columns.map(({ name, isText, values }): Kind => {
    if (name === options.time) return "time";
    return isText ? "text" : kindOf(values, style);
  });
  return { kinds, style };
}
