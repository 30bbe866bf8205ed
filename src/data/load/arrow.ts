import { readFile } from "node:fs/promises";
import { InputError } from "../../numeric/index.js";
import type { LoadOptions } from "./options.js";
import type { RawColumn } from "./raw-table.js";
import { type Cell, columnOfCells } from "./rows.js";

/** Reads an Arrow IPC file or stream. */
export async function readArrow(path: string, options: LoadOptions): Promise<RawColumn[]> {
  const { tableFromIPC, DataType } = await import("apache-arrow");
  let table: ReturnType<typeof tableFromIPC>;
  try {
    table = tableFromIPC(await readFile(path));
  } catch (error) {
    throw new InputError(`load: ${path} is no Arrow IPC file: ${(error as Error).message}.`);
  }
  return table.schema.fields.map((field, c) => {
    const vector = table.getChildAt(c)!;
    const isTime = DataType.isTimestamp(field.type) || DataType.isDate(field.type);
    const cells = Array.from({ length: table.numRows }, (_, i): Cell => {
      const cell = vector.get(i);
      return isTime && cell !== null ? new Date(Number(cell)) : (cell as Cell);
    });
    return columnOfCells(field.name, cells, options);
  });
}
