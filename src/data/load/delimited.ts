import { readFile, stat } from "node:fs/promises";
import { InputError } from "../../numeric/index.js";
import type { Remark } from "../result.js";
import { type Dialect, sniffDialect } from "./dialect.js";
import { collect, literal, withDuckDB } from "./duckdb.js";
import { kindsOf, type NumberStyle } from "./kinds.js";
import { type LoadOptions, usualMissing } from "./options.js";
import type { RawColumn } from "./raw-table.js";
import { records } from "./records.js";

const diagnosableBytes = 400_000_000;

/** Reads a delimited file (CSV, TSV, semicolons) through DuckDB, every cell checked. */
export async function readDelimited(
  path: string,
  options: LoadOptions,
  onRows?: (rows: number) => void,
): Promise<{ columns: RawColumn[]; findings: Remark[] }> {
  const dialect = await sniffDialect(path, options.delimiter, options.names);
  if (dialect.sample.length === 0) throw new InputError(`load: ${path} has a header but no rows.`);
  const missing = options.missing ?? usualMissing;
  const kinds = kindsOf(dialect, missing, [options.time, ...(options.text ?? [])]);
  const query = `SELECT * FROM read_csv(${literal(path)}, ${arguments_(dialect, kinds.style, missing, options)}, columns={${dialect.header
    .map((name, i) => `${literal(name)}: '${kinds.types[i]}'`)
    .join(", ")}})`;
  const columns = await withDuckDB(async (connection) => {
    try {
      return await collect(connection, query, onRows);
    } catch (error) {
      throw await diagnose(path, dialect, kinds.types, kinds.style, missing, error as Error);
    }
  });
  return {
    columns: columns.map((column, i) => asBoolean(column, kinds.booleans[i]!)),
    findings: told(dialect, kinds.style),
  };
}

function arguments_(
  dialect: Dialect,
  style: NumberStyle,
  missing: readonly string[],
  options: LoadOptions,
): string {
  const list = [
    `header=${options.names ? "false" : "true"}`,
    "auto_detect=false",
    `delim=${literal(dialect.delimiter)}`,
    `quote='"'`,
    `escape='"'`,
    `nullstr=[${missing.map(literal).join(", ")}]`,
    `encoding='${dialect.encoding}'`,
    "max_line_size=20000000",
  ];
  if (style.decimal === ",") list.push("decimal_separator=','");
  if (style.thousands) list.push(`thousands=${literal(style.thousands)}`);
  return list.join(", ");
}

function asBoolean(column: RawColumn, isBoolean: boolean): RawColumn {
  if (!isBoolean || column.kind !== "text") return column;
  const values = Float64Array.from(column.values, (text) =>
    text === null ? Number.NaN : /^true$/i.test(text) ? 1 : 0,
  );
  return { name: column.name, kind: "boolean", values };
}

/** What a careful reader must be told of the dialect. */
function told(dialect: Dialect, style: NumberStyle): Remark[] {
  const findings: Remark[] = [];
  const names: Record<string, string> = { ";": "semicolons", "\t": "tabs", "|": "vertical bars" };
  const say = (text: string) => findings.push({ severity: "note", text });
  if (dialect.delimiter !== ",")
    say(`columns are separated by ${names[dialect.delimiter] ?? JSON.stringify(dialect.delimiter)}`);
  if (style.decimal === ",") say("numbers have a decimal comma");
  if (style.thousands) say(`numbers have ${JSON.stringify(style.thousands)} between thousands`);
  if (dialect.encoding === "latin-1") say("the file is not UTF-8 and was read as Latin-1");
  return findings;
}

/** Finds the record that made DuckDB stop and says it in Lagbook's words. */
async function diagnose(
  path: string,
  dialect: Dialect,
  types: readonly string[],
  style: NumberStyle,
  missing: readonly string[],
  error: Error,
): Promise<Error> {
  const { size } = await stat(path);
  if (size > diagnosableBytes)
    return new InputError(`load: ${path} cannot be read: ${error.message.split("\n")[0]}.`);
  const bytes = await readFile(path);
  const text = new TextDecoder(dialect.encoding === "utf-8" ? "utf-8" : "windows-1252").decode(bytes);
  let row = dialect.headerless ? 1 : 0;
  for (const { fields, line } of records(text, dialect.delimiter)) {
    const place = `row ${row} (line ${line}) of ${path}`;
    if (fields.length !== dialect.header.length) {
      return new InputError(
        `load: ${place} has ${fields.length} fields, but the header names ${dialect.header.length} columns. Mend the line in the file.`,
      );
    }
    if (row > 0) {
      const at = fields.findIndex(
        (field, i) => types[i] === "DOUBLE" && !missing.includes(field) && !style.accepts(field),
      );
      if (at >= 0) {
        const name = JSON.stringify(dialect.header[at]);
        return new InputError(
          `load: ${place}, column ${name}: ${JSON.stringify(fields[at])} is not a number. Mend the cell, name it in ` +
            `missing: [${JSON.stringify(fields[at])}, ...] if it stands for a missing value, or keep the column as text with text: [${name}].`,
        );
      }
    }
    row++;
  }
  return new InputError(`load: ${path} cannot be read: ${error.message.split("\n")[0]}.`);
}
