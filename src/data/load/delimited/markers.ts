import { eachChunk, literal, withDuckDB } from "../duckdb.js";
import { type LoadOptions, missingTexts } from "../options.js";
import type { RawColumn } from "../raw-table.js";
import type { Dialect } from "./dialect.js";
import { readCsv } from "./fast.js";
import type { Kinds } from "./kinds.js";

/** How often each marker of a missing value stands in each column; reads the file again only when something is missing. */
export async function countMarkers(
  path: string,
  dialect: Dialect,
  { kinds, style }: Kinds,
  options: LoadOptions,
  columns: readonly RawColumn[],
): Promise<Map<string, number>[]> {
  const counts = columns.map(() => new Map<string, number>());
  const markers = [...missingTexts(options)];
  const asked = columns.flatMap((column, i) =>
    hasMissing(column) ? markers.map((marker) => ({ i, marker })) : [],
  );
  if (asked.length === 0) return counts;
  const texts = kinds.map(() => "VARCHAR");
  const file = readCsv(path, dialect, texts, style.decimal, options, true);
  const select = asked.map(
    ({ i, marker }) => `CAST(count(*) FILTER (coalesce(c${i}, '') = ${literal(marker)}) AS DOUBLE)`,
  );
  await withDuckDB((connection) =>
    eachChunk(connection, `SELECT ${select.join(", ")} FROM ${file}`, (vector) => {
      asked.forEach(({ i, marker }, c) => {
        const count = vector(c).getItem(0) as number;
        if (count > 0) counts[i]!.set(marker, count);
      });
    }),
  );
  return counts;
}

function hasMissing(column: RawColumn): boolean {
  if (column.kind === "text") return column.values.includes(null);
  const { values } = column;
  for (let i = 0; i < values.length; i++) if (Number.isNaN(values[i]!)) return true;
  return false;
}
