/** Text as a notebook file holds it: one string, or its lines with their line ends. */
export type Multiline = string | readonly string[];

/** A MIME bundle as a notebook file holds it. */
export type FileBundle = Record<string, unknown>;

/** One output of a code cell, as nbformat 4 writes it. */
export type CellOutput =
  | { output_type: "stream"; name: "stdout" | "stderr"; text: Multiline }
  | { output_type: "display_data"; data: FileBundle; metadata: Record<string, unknown> }
  | {
      output_type: "execute_result";
      execution_count: number | null;
      data: FileBundle;
      metadata: Record<string, unknown>;
    }
  | { output_type: "error"; ename: string; evalue: string; traceback: string[] };

/** A cell of any kind. */
export interface Cell {
  cell_type: "code" | "markdown" | "raw";
  id?: string;
  source: Multiline;
  metadata: Record<string, unknown>;
  attachments?: Record<string, FileBundle>;
  execution_count?: number | null;
  outputs?: CellOutput[];
}

/** A notebook file of format 4. */
export interface Notebook {
  nbformat: 4;
  nbformat_minor: number;
  metadata: Record<string, unknown>;
  cells: Cell[];
}

/** The file is no notebook that can be run. */
export class NotebookError extends Error {
  constructor(message: string) {
    super(message);
    this.name = "NotebookError";
  }
}

/** A text that may be held as lines, as one string. */
export function joined(text: Multiline): string {
  return typeof text === "string" ? text : text.join("");
}

/**
 * Reads a notebook of format 4 (any minor version).
 *
 * @param name the file's name, for messages
 * @throws NotebookError that says what is wrong, and in which cell
 */
export function parseNotebook(text: string, name: string): Notebook {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch (problem) {
    throw new NotebookError(`${name} is not a notebook: ${(problem as Error).message}`);
  }
  const file = value as Partial<Notebook> | null;
  if (typeof file !== "object" || file === null || !Number.isInteger(file.nbformat)) {
    throw new NotebookError(`${name} is not a notebook: it has no "nbformat"`);
  }
  if (file.nbformat !== 4 || !Array.isArray(file.cells)) {
    throw new NotebookError(
      `${name} is of notebook format ${file.nbformat}; format 4 is read. Open and save it in a current Jupyter.`,
    );
  }
  file.cells.forEach((cell, at) => {
    checkCell(cell, `${name}, cell ${at + 1}`);
  });
  return {
    ...file,
    nbformat: 4,
    nbformat_minor: file.nbformat_minor ?? 0,
    metadata: file.metadata ?? {},
  } as Notebook;
}

function checkCell(cell: Partial<Cell> | null, where: string): void {
  if (!cell || !["code", "markdown", "raw"].includes(cell.cell_type ?? "")) {
    throw new NotebookError(
      `${where}: cell_type is ${JSON.stringify(cell?.cell_type)}, not code, markdown or raw`,
    );
  }
  const source: unknown = cell.source;
  const lines = Array.isArray(source) && source.every((line) => typeof line === "string");
  if (typeof source !== "string" && !lines) {
    throw new NotebookError(`${where}: source is neither a text nor a list of lines`);
  }
}

/**
 * Writes a notebook as Jupyter itself writes it (keys sorted, texts as lines, one space of indentation), so that a
 * file which Jupyter saves after it differs only where its content does.
 */
export function writeNotebook(notebook: Notebook): string {
  const cells = notebook.cells.map((cell) => ({
    ...cell,
    source: asLines(cell.source),
    ...(cell.outputs ? { outputs: cell.outputs.map(fileOutput) } : {}),
  }));
  return `${JSON.stringify(sorted({ ...notebook, cells }), null, 1)}\n`;
}

// Lines end where Python's str.splitlines sees an end, since that is what splits them in Jupyter.
const ends = "\\n\\r\\v\\f\\x1c-\\x1e\\x85\\u2028\\u2029";
const line = new RegExp(`[^${ends}]*(?:\\r\\n|[${ends}])|[^${ends}]+$`, "g");

function asLines(text: Multiline): string[] {
  return joined(text).match(line) ?? [];
}

function fileOutput(output: CellOutput): unknown {
  if (output.output_type === "stream") return { ...output, text: asLines(output.text) };
  if (output.output_type === "error") return output;
  const data = Object.fromEntries(
    Object.entries(output.data).map(([mime, value]) => [
      mime,
      typeof value === "string" && !isJson(mime) ? asLines(value) : value,
    ]),
  );
  return { ...output, data };
}

/** Whether a MIME type's value is JSON, which a notebook file holds as it is. */
export function isJson(mime: string): boolean {
  return mime === "application/json" || mime.endsWith("+json");
}

function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted);
  if (typeof value !== "object" || value === null) return value;
  const entries = Object.entries(value as Record<string, unknown>).sort(([a], [b]) => (a < b ? -1 : 1));
  return Object.fromEntries(entries.map(([key, inner]) => [key, sorted(inner)]));
}
