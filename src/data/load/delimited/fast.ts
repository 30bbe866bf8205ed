import { eachChunk, literal, NumberParts, withDuckDB } from "../duckdb.js";
import { type LoadOptions, missingTexts } from "../options.js";
import type { RawColumn } from "../raw-table.js";
import type { Dialect } from "./dialect.js";
import type { Kinds } from "./kinds.js";
import { settle } from "./strict.js";
import { type TimePattern, timePattern } from "./time-pattern.js";

/** Whether `readFast` can be tried: UTF-8, no separators of thousands. */
export function isPlain(dialect: Dialect, { style }: Kinds): boolean {
  return dialect.encoding === "utf-8" && style.thousands === undefined;
}

/**
 * Reads a delimited file through DuckDB, numbers and times converted there. Throws, without saying where, whatever
 * DuckDB throws for a file that is not well formed, and for numbers that are none or infinite; undefined when the
 * times are not all written in one form that it knows.
 */
export async function readFast(
  path: string,
  dialect: Dialect,
  { kinds, style }: Kinds,
  options: LoadOptions,
  onRows?: (rows: number) => void,
): Promise<RawColumn[] | undefined> {
  const { header } = dialect;
  const timeAt = kinds.indexOf("time");
  const pattern = timeAt < 0 ? undefined : timePattern(dialect.sample.map((row) => row[timeAt] ?? ""));
  const types = kinds.map((kind) => (kind === "number" ? "DOUBLE" : "VARCHAR"));
  const selected = kinds.flatMap((kind, i) => {
    if (kind === "number") return [checkedNumber(`c${i}`)];
    if (kind === "time" && pattern) return pattern.select(`c${i}`);
    return [`c${i}`];
  });
  const query = `SELECT ${selected.join(", ")} FROM ${readCsv(path, dialect, types, style.decimal, options)}`;
  const numbers = selected.map(() => new NumberParts());
  const texts = selected.map((): (string | null)[] => []);
  const isNumber = kinds.flatMap((kind) =>
    kind === "time" && pattern ? pattern.select("").map(() => true) : [kind === "number"],
  );
  await withDuckDB((connection) =>
    eachChunk(
      connection,
      query,
      (vector, rows) => {
        for (let c = 0; c < selected.length; c++) {
          const cells = vector(c);
          if (isNumber[c]) numbers[c]!.add(cells, rows);
          else for (let i = 0; i < rows; i++) texts[c]!.push(cells.getItem(i) as string | null);
        }
      },
      onRows,
    ),
  );
  let at = 0;
  const columns: RawColumn[] = [];
  for (let i = 0; i < kinds.length; i++) {
    const name = header[i]!;
    const kind = kinds[i]!;
    if (kind === "time" && pattern) {
      const values = numbers[at++]!.join();
      const walls = pattern.offset ? numbers[at++]!.join() : undefined;
      if (values.includes(Number.NaN)) return undefined;
      columns.push(times(name, pattern, values, walls));
    } else if (kind === "number") columns.push({ name, kind, values: numbers[at++]!.join() });
    else columns.push(textual({ name, kind: "text", values: texts[at++]! }, kind, style));
  }
  return columns;
}

function times(
  name: string,
  { form, offset }: TimePattern,
  values: Float64Array,
  walls: Float64Array | undefined,
): RawColumn {
  if (form === "integer") return { name, kind: "number", values };
  return { name, kind: "instant", form, values, offset, ...(walls ? { walls } : {}) };
}

function textual(column: RawColumn & { kind: "text" }, kind: string, style: Kinds["style"]): RawColumn {
  return kind === "boolean" || kind === "undecided" ? settle(column, style, kind) : column;
}

/** Null becomes NaN; NaN and infinity, which no written number is, stop the query. */
function checkedNumber(column: string): string {
  return `CASE WHEN isnan(${column}) OR isinf(${column}) THEN error('not a finite number') ELSE coalesce(${column}, 'nan'::DOUBLE) END`;
}

/** The call that reads the file with columns c0, c1, ... of these types. */
export function readCsv(
  path: string,
  dialect: Dialect,
  types: readonly string[],
  decimal: "." | ",",
  options: LoadOptions,
  keepMarkers = false,
): string {
  const markers = keepMarkers ? [] : [...missingTexts(options)];
  const list = [
    literal(path),
    `header=${dialect.headerless ? "false" : "true"}`,
    "auto_detect=false",
    `delim=${literal(dialect.delimiter)}`,
    `quote='"'`,
    `escape='"'`,
    `skip=${options.skip ?? 0}`,
    `nullstr=[${(markers.length > 0 ? markers : ["\u0001"]).map(literal).join(", ")}]`,
    `decimal_separator='${decimal}'`,
    `columns={${types.map((type, i) => `'c${i}': '${type}'`).join(", ")}}`,
  ];
  return `read_csv(${list.join(", ")})`;
}
