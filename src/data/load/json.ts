import { createReadStream } from "node:fs";
import { readFile } from "node:fs/promises";
import { InputError } from "../../numeric/index.js";
import type { OnRows } from "./delimited/delimited.js";
import type { LoadOptions } from "./options.js";
import { RowProblem } from "./problem.js";
import type { RawColumn } from "./raw-table.js";
import { type Cell, columnOfCells } from "./rows.js";

/** Reads JSON lines (one object a line) or one JSON array of objects. A key that an object lacks is missing there. */
export async function readJson(path: string, options: LoadOptions, onRows: OnRows): Promise<RawColumn[]> {
  const gathered = new Gathered();
  if ((await firstCharacter(path)) === "[") {
    let rows: unknown;
    try {
      rows = JSON.parse(await readFile(path, "utf8"));
    } catch (error) {
      throw new InputError(`load: ${path} is no JSON: ${(error as Error).message}.`);
    }
    for (const row of rows as unknown[]) gathered.add(row);
  } else {
    let line = 0;
    for await (const text of linesOf(path)) {
      line++;
      if (text.trim() === "") continue;
      gathered.add(parsed(text, gathered.rows, line), text, line);
      if (gathered.rows % 10_000 === 0) onRows(gathered.rows);
    }
  }
  if (gathered.rows === 0) throw new InputError(`load: ${path} has no rows.`);
  return gathered.columns(options);
}

async function firstCharacter(path: string): Promise<string> {
  for await (const chunk of createReadStream(path, { end: 4095 })) {
    return (
      (chunk as Buffer)
        .toString("utf8")
        .replace(/^\ufeff/, "")
        .trimStart()[0] ?? ""
    );
  }
  return "";
}

async function* linesOf(path: string): AsyncGenerator<string> {
  const decoder = new TextDecoder("utf-8");
  let rest = "";
  for await (const chunk of createReadStream(path, { highWaterMark: 1 << 20 })) {
    const lines = (rest + decoder.decode(chunk as Buffer, { stream: true })).split("\n");
    rest = lines.pop()!;
    yield* lines;
  }
  yield rest + decoder.decode();
}

function parsed(text: string, row: number, line: number): unknown {
  try {
    return JSON.parse(text);
  } catch (error) {
    throw new RowProblem(
      row,
      "",
      `it is no JSON: ${(error as Error).message}. Mend the line in the file.`,
      line,
    );
  }
}

/** Collects objects into columns, in the order in which their keys first come up. */
class Gathered {
  rows = 0;
  readonly #cells = new Map<string, Cell[]>();

  add(row: unknown, text?: string, line?: number): void {
    if (typeof row !== "object" || row === null || Array.isArray(row)) {
      throw new RowProblem(this.rows, "", "it is no object with one value per column.", line);
    }
    for (const [name, value] of Object.entries(row)) {
      const where = `column ${JSON.stringify(name)}`;
      if (typeof value === "object" && value !== null) {
        throw new RowProblem(
          this.rows,
          where,
          "the value is a list or an object; give one value per column.",
          line,
        );
      }
      if (typeof value === "number" && Math.abs(value) > Number.MAX_SAFE_INTEGER) {
        // Only the text shows whether digits were lost: 1e300 has lost none.
        const digits = new RegExp(`${escaped(JSON.stringify(name))}\\s*:\\s*-?(\\d+)\\s*[,}]`).exec(
          text ?? "",
        )?.[1];
        if (digits !== undefined && BigInt(digits) !== BigInt(Math.abs(value))) {
          throw new RowProblem(this.rows, where, `${digits} has more digits than a double holds.`, line);
        }
      }
      let cells = this.#cells.get(name);
      if (!cells) {
        cells = [];
        this.#cells.set(name, cells);
      }
      cells[this.rows] = value as Cell;
    }
    this.rows++;
  }

  columns(options: LoadOptions): RawColumn[] {
    return [...this.#cells].map(([name, cells]) => {
      cells.length = this.rows;
      return columnOfCells(name, Array.from(cells), options);
    });
  }
}

function escaped(text: string): string {
  return text.replace(/[.*+?^${}()|[\]\\]/g, "\\$&");
}
