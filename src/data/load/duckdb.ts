import type { DuckDBConnection } from "@duckdb/node-api";
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
    database ? { access_mode: "READ_ONLY" } : { preserve_insertion_order: "true" },
  );
  const connection = await instance.connect();
  try {
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

const numeric = /^(TINYINT|SMALLINT|INTEGER|BIGINT|HUGEINT|U[A-Z]+INT|FLOAT|DOUBLE|DECIMAL.*)$/;

/**
 * Runs a query and collects its columns chunk by chunk: numbers as doubles, truth values as 0 and 1, everything else
 * as the text that DuckDB writes for it (dates and times in ISO 8601). `onRows` hears the rows read so far.
 */
export async function collect(
  connection: DuckDBConnection,
  query: string,
  onRows?: (rows: number) => void,
): Promise<RawColumn[]> {
  const described = await connection.runAndReadAll(`DESCRIBE ${query}`);
  const shape = described.getRows().map((row) => ({ name: String(row[0]), type: String(row[1]) }));
  const wanted = shape.map(({ name, type }) => {
    const column = identifier(name);
    if (type === "DOUBLE" || type === "VARCHAR") return column;
    if (numeric.test(type)) return `CAST(${column} AS DOUBLE) AS ${column}`;
    if (type === "BOOLEAN") return `CAST(CAST(${column} AS INTEGER) AS DOUBLE) AS ${column}`;
    return `CAST(${column} AS VARCHAR) AS ${column}`;
  });
  const result = await connection.stream(`SELECT ${wanted.join(", ")} FROM (${query})`);
  const isText = shape.map(({ type }) => !(numeric.test(type) || type === "BOOLEAN"));
  const parts: (Float64Array | (string | null)[])[][] = shape.map(() => []);
  let rows = 0;
  for (;;) {
    const chunk = await result.fetchChunk();
    if (!chunk || chunk.rowCount === 0) break;
    for (let c = 0; c < shape.length; c++) {
      const vector = chunk.getColumnVector(c);
      if (isText[c]) {
        parts[c]!.push(Array.from({ length: chunk.rowCount }, (_, i) => vector.getItem(i) as string | null));
      } else {
        const values = new Float64Array(chunk.rowCount);
        for (let i = 0; i < values.length; i++)
          values[i] = (vector.getItem(i) as number | null) ?? Number.NaN;
        parts[c]!.push(values);
      }
    }
    rows += chunk.rowCount;
    onRows?.(rows);
  }
  return shape.map(({ name, type }, c): RawColumn => {
    if (isText[c]) return { name, kind: "text", values: (parts[c] as (string | null)[][]).flat() };
    const values = new Float64Array(rows);
    let at = 0;
    for (const part of parts[c] as Float64Array[]) {
      values.set(part, at);
      at += part.length;
    }
    return { name, kind: type === "BOOLEAN" ? "boolean" : "number", values };
  });
}
