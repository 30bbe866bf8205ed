import type { DuckDBConnection, DuckDBVector } from "@duckdb/node-api";
import { InputError } from "../../numeric/index.js";
import type { LoadOptions } from "./options.js";
import type { RawColumn } from "./raw-table.js";

/** Runs `work` on a connection to an in-memory or given DuckDB database, opened read-only and closed afterwards. */
export async function withDuckDB<R>(
  work: (connection: DuckDBConnection) => Promise<R>,
  database?: string,
): Promise<R> {
  // Loaded at first use: the library takes a while, and a kernel should start without it.
  const { DuckDBInstance } = await import("@duckdb/node-api");
  const instance = await DuckDBInstance.create(
    database ?? ":memory:",
    database ? { access_mode: "READ_ONLY" } : {},
  );
  const connection = await instance.connect();
  try {
    // Rows wait in a buffer of this size until they are fetched; dates are read alike on every machine.
    await connection.run("SET streaming_buffer_size = '32MB'; SET TimeZone = 'UTC'");
    return await work(connection);
  } finally {
    connection.closeSync();
    instance.closeSync();
  }
}

/** A text as an SQL literal. */
export function literal(text: string): string {
  return `'${text.replaceAll("'", "''")}'`;
}

/** A name as an SQL identifier. */
export function identifier(name: string): string {
  return `"${name.replaceAll('"', '""')}"`;
}

/** The first line of what DuckDB says, less the name of its error class. */
export function said(error: unknown): string {
  return (error as Error).message
    .split("\n")[0]!
    .replace(/^[A-Z][A-Za-z ]* Error: /, "")
    .replace(/\.\s*$/, "");
}

/** Streams the rows of a query: `take` sees each chunk's vectors and the number of its rows. Returns the number of rows. */
export async function eachChunk(
  connection: DuckDBConnection,
  query: string,
  take: (vector: (column: number) => DuckDBVector, rows: number) => void,
  onRows?: (rows: number) => void,
): Promise<number> {
  const result = await connection.stream(query);
  let rows = 0;
  for (;;) {
    const chunk = await result.fetchChunk();
    if (!chunk || chunk.rowCount === 0) return rows;
    take((column) => chunk.getColumnVector(column), chunk.rowCount);
    rows += chunk.rowCount;
    onRows?.(rows);
  }
}

/** A column of numbers gathered chunk by chunk; the chunks are let go as they are put together. */
export class NumberParts {
  #parts: Float64Array[] = [];
  #length = 0;

  /** Adds the first `rows` values of a vector of doubles, which must hold no null (the query turns them into NaN). */
  add(vector: DuckDBVector, rows: number): void {
    const values = new Float64Array(rows);
    // The vector's own array, where it shows one, saves a call for each of what may be millions of values.
    const { items } = vector as unknown as { readonly items?: unknown };
    if (items instanceof Float64Array && items.length >= rows) values.set(items.subarray(0, rows));
    else for (let i = 0; i < rows; i++) values[i] = (vector.getItem(i) as number | null) ?? Number.NaN;
    this.#parts.push(values);
    this.#length += rows;
  }

  join(): Float64Array {
    const values = new Float64Array(this.#length);
    let at = 0;
    for (const part of this.#parts) {
      values.set(part, at);
      at += part.length;
    }
    this.#parts = [];
    return values;
  }
}

const numeric = /^(TINYINT|SMALLINT|INTEGER|BIGINT|HUGEINT|U[A-Z]+INT|U?BIGNUM|FLOAT|DOUBLE|DECIMAL.*)$/;

interface Shape {
  readonly name: string;
  readonly kind: RawColumn["kind"];
  readonly type: string;
  /** What to select so that a vector of doubles or of texts arrives, without nulls among doubles. */
  readonly select: string;
}

/**
 * Runs a query and collects its columns: numbers as doubles, truth values as 0 and 1, dates and times as instants,
 * everything else as the text that DuckDB writes for it. `onRows` hears the rows read so far.
 */
export async function collect(
  connection: DuckDBConnection,
  query: string,
  options: LoadOptions,
  onRows?: (rows: number) => void,
): Promise<RawColumn[]> {
  const described = await connection.runAndReadAll(`DESCRIBE ${query}`);
  const shapes = described.getRows().map((row) => {
    const [name, type] = [String(row[0]), String(row[1])];
    return options.text?.includes(name) ? asText(name, type) : shapeOf(name, type);
  });
  const twice = shapes.find(({ name }, i) => shapes.findIndex((other) => other.name === name) !== i);
  if (twice) throw new InputError(`load: there are two columns called ${JSON.stringify(twice.name)}.`);
  const numbers = shapes.map(({ kind }) => (kind === "text" ? undefined : new NumberParts()));
  const texts = shapes.map((): (string | null)[] => []);
  const select = shapes.map((shape) => shape.select).join(", ");
  await eachChunk(
    connection,
    `SELECT ${select} FROM (${query})`,
    (vector, rows) => {
      for (let c = 0; c < shapes.length; c++) {
        const cells = vector(c);
        const part = numbers[c];
        if (part) part.add(cells, rows);
        else for (let i = 0; i < rows; i++) texts[c]!.push(cells.getItem(i) as string | null);
      }
    },
    onRows,
  );
  return shapes.map(({ name, kind, type }, c): RawColumn => {
    if (kind === "text") return { name, kind, values: texts[c]! };
    const values = numbers[c]!.join();
    if (kind !== "instant") return { name, kind, values };
    return {
      name,
      kind,
      values,
      form: type === "DATE" ? "date" : "date-time",
      offset: type.endsWith("WITH TIME ZONE"),
    };
  });
}

function shapeOf(name: string, type: string): Shape {
  const column = identifier(name);
  const filled = (expression: string) => `coalesce(CAST(${expression} AS DOUBLE), 'nan'::DOUBLE)`;
  if (/^(U?BIGINT|HUGEINT)$/.test(type)) {
    const told = literal(
      `column ${JSON.stringify(name)} holds whole numbers of more digits than a double holds; keep it as text with text: [${JSON.stringify(name)}]`,
    );
    const lost = `CAST(${column} AS HUGEINT) <> TRY_CAST(CAST(${column} AS DOUBLE) AS HUGEINT)`;
    return {
      name,
      type,
      kind: "number",
      select: `CASE WHEN ${lost} THEN error(${told}) ELSE ${filled(column)} END`,
    };
  }
  // Through text, a decimal becomes the double nearest to it, however many digits it has.
  if (type.startsWith("DECIMAL")) {
    return { name, type, kind: "number", select: filled(`CAST(${column} AS VARCHAR)`) };
  }
  if (numeric.test(type)) return { name, type, kind: "number", select: filled(column) };
  if (type === "BOOLEAN")
    return { name, type, kind: "boolean", select: filled(`CAST(${column} AS INTEGER)`) };
  if (type === "DATE") {
    return { name, type, kind: "instant", select: filled(`epoch_ms(CAST(${column} AS TIMESTAMP))`) };
  }
  if (type.startsWith("TIMESTAMP")) {
    return { name, type, kind: "instant", select: filled(milliseconds(name)) };
  }
  return asText(name, type);
}

function asText(name: string, type: string): Shape {
  const column = identifier(name);
  return { name, type, kind: "text", select: type === "VARCHAR" ? column : `CAST(${column} AS VARCHAR)` };
}

/** Milliseconds of a time stamp; one that is finer than a millisecond stops the query. */
function milliseconds(name: string): string {
  const column = identifier(name);
  const told = literal(`column ${JSON.stringify(name)} holds a time that is finer than a millisecond`);
  return `CASE WHEN epoch_ns(${column}) % 1000000 <> 0 THEN error(${told}) ELSE epoch_ms(${column}) END`;
}
