import { InputError } from "../../numeric/index.js";
import type { LoadOptions } from "./options.js";
import type { RawColumn } from "./raw-table.js";
import { type Cell, columnOfCells } from "./rows.js";

/** Reads one sheet of an Excel workbook (.xlsx): the first row names the columns. */
export async function readWorkbook(path: string, options: LoadOptions): Promise<RawColumn[]> {
  const { default: readSheets } = await import("read-excel-file/node");
  const sheets = (await readSheets(path)) as unknown as { sheet: string; data: Cell[][] }[];
  const wanted = options.sheet ?? 1;
  const found =
    typeof wanted === "number" ? sheets[wanted - 1] : sheets.find(({ sheet }) => sheet === wanted);
  if (!found) {
    const names = sheets.map(({ sheet }) => JSON.stringify(sheet)).join(", ");
    throw new InputError(`load: ${path} has no sheet ${JSON.stringify(wanted)}. There are: ${names}.`);
  }
  const [header, ...rows] = found.data;
  if (!header || rows.length === 0)
    throw new InputError(`load: sheet ${found.sheet} of ${path} has no rows.`);
  const names = header.map((cell, i) => {
    if (cell === null || cell === undefined || cell === "") {
      throw new InputError(`load: column ${i + 1} of sheet ${found.sheet} of ${path} has no name.`);
    }
    return String(cell);
  });
  const twice = names.find((name, i) => names.indexOf(name) !== i);
  if (twice !== undefined)
    throw new InputError(`load: ${path} has two columns called ${JSON.stringify(twice)}.`);
  return names.map((name, c) =>
    columnOfCells(
      name,
      rows.map((row) => row[c]),
      options,
    ),
  );
}
