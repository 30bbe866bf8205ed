import { suggestion, type TimeTable } from "../../data/index.js";
import { InputError } from "../../numeric/index.js";

/** A column of numbers of a table by its name; throws InputError with what was asked. */
export function requireColumn(
  asked: string,
  table: TimeTable,
  name: string,
): { name: string; values: Float64Array } {
  if (!table.has(name)) {
    throw new InputError(
      `${asked}: the table has no column ${JSON.stringify(name)}.${suggestion(name, table.names)}`,
    );
  }
  const column = table.column(name);
  if (column.kind === "text")
    throw new InputError(`${asked}: column ${JSON.stringify(name)} holds text, not numbers`);
  return { name, values: column.values };
}
