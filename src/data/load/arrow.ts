import { readFile } from "node:fs/promises";
import type { DataType, Vector } from "apache-arrow";
import { InputError } from "../../numeric/index.js";
import { decodeLz4Frame } from "./lz4.js";
import type { LoadOptions } from "./options.js";
import { RowProblem } from "./problem.js";
import type { RawColumn } from "./raw-table.js";
import { type Cell, columnOfCells } from "./rows.js";

type Arrow = typeof import("apache-arrow");

/** Reads an Arrow IPC file or stream (Feather version 2 is one). */
export async function readArrow(path: string, options: LoadOptions): Promise<RawColumn[]> {
  const arrow = await import("apache-arrow");
  arrow.compressionRegistry.set(arrow.CompressionType.LZ4_FRAME, { decode: decodeLz4Frame });
  const bytes = await readFile(path);
  let table: ReturnType<typeof arrow.tableFromIPC>;
  try {
    table = arrow.tableFromIPC(bytes);
  } catch (error) {
    const { message } = error as Error;
    const out = message.includes("codec")
      ? "it is compressed with Zstandard; save it with LZ4, uncompressed, or as Parquet"
      : message;
    throw new InputError(`load: ${path} cannot be read as Arrow IPC: ${out}.`);
  }
  if (table.schema.fields.length === 0) throw new InputError(`load: ${path} is no Arrow IPC file.`);
  const names = table.schema.fields.map(({ name }) => name);
  const twice = names.find((name, i) => names.indexOf(name) !== i);
  if (twice !== undefined) {
    throw new InputError(`load: ${path} has two columns called ${JSON.stringify(twice)}.`);
  }
  return table.schema.fields.map(({ name, type }, c) =>
    columnOf(arrow, name, type, table.getChildAt(c)!, options),
  );
}

function columnOf(
  arrow: Arrow,
  name: string,
  type: DataType,
  vector: Vector,
  options: LoadOptions,
): RawColumn {
  const { DataType } = arrow;
  if (DataType.isDate(type) || DataType.isTimestamp(type)) {
    const where = `column ${JSON.stringify(name)}`;
    const values = Float64Array.from({ length: vector.length }, (_, row) => {
      const value = vector.get(row) as number | null;
      if (value === null) return Number.NaN;
      if (Number.isInteger(Number(value))) return Number(value);
      throw new RowProblem(row, where, "the time is finer than a millisecond.");
    });
    const form = DataType.isDate(type) ? "date" : "date-time";
    const offset = DataType.isTimestamp(type) && type.timezone !== null && type.timezone !== undefined;
    return { name, kind: "instant", form, values, offset };
  }
  if (DataType.isFloat(type) && vector.nullCount === 0 && type.precision === arrow.Precision.DOUBLE) {
    return { name, kind: "number", values: Float64Array.from(vector.toArray() as Float64Array) };
  }
  const scale = DataType.isDecimal(type) ? type.scale : undefined;
  const cells = Array.from({ length: vector.length }, (_, row): Cell => {
    const cell = vector.get(row) as unknown;
    if (scale !== undefined && cell !== null) return decimal(cell as Uint32Array, scale);
    if (cell === null || typeof cell !== "object") return cell as Cell;
    throw new RowProblem(row, `column ${JSON.stringify(name)}`, `values of type ${type} cannot be read.`);
  });
  return columnOfCells(name, cells, options);
}

/** The double nearest to a decimal of little-endian 32-bit words in two's complement. */
function decimal(words: Uint32Array, scale: number): number {
  let whole = 0n;
  for (let i = words.length - 1; i >= 0; i--) whole = (whole << 32n) | BigInt(words[i]!);
  return Number(`${BigInt.asIntN(32 * words.length, whole)}e${-scale}`);
}
