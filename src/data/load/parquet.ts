import { InputError } from "../../numeric/index.js";
import type { OnRows } from "./delimited/delimited.js";
import { collect, literal, said, withDuckDB } from "./duckdb.js";
import type { LoadOptions } from "./options.js";
import type { RawColumn } from "./raw-table.js";

/** Reads a Parquet file through DuckDB. */
export async function readParquet(path: string, options: LoadOptions, onRows: OnRows): Promise<RawColumn[]> {
  try {
    return await withDuckDB(async (connection) => {
      const schema = await connection.runAndReadAll(
        `SELECT name FROM parquet_schema(${literal(path)}) OFFSET 1`,
      );
      requireDistinct(
        path,
        schema.getRows().map((row) => String(row[0])),
      );
      const counted = await connection.runAndReadAll(
        `SELECT CAST(sum(num_rows) AS DOUBLE) FROM parquet_file_metadata(${literal(path)})`,
      );
      const about = counted.getRows()[0]?.[0] as number;
      return collect(connection, `SELECT * FROM read_parquet(${literal(path)})`, options, (rows) =>
        onRows(rows, about),
      );
    });
  } catch (error) {
    if (error instanceof InputError) throw error;
    throw new InputError(`load: ${path} cannot be read: ${said(error)}.`);
  }
}

/** DuckDB would rename the second of two columns whose names differ in case alone. */
function requireDistinct(path: string, names: readonly string[]): void {
  const lower = names.map((name) => name.toLowerCase());
  const second = lower.findIndex((name, i) => lower.indexOf(name) !== i);
  if (second < 0) return;
  const first = names[lower.indexOf(lower[second]!)];
  throw new InputError(
    `load: ${path} has columns called ${JSON.stringify(first)} and ${JSON.stringify(names[second])}, which are told apart by case at most. Rename one.`,
  );
}
