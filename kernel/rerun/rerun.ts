import { Collector, type Sent } from "./collector.js";
import { type Cell, joined, type Notebook } from "./notebook.js";
import { startWatchdog } from "./watchdog.js";

/** What a rerun needs of a session. */
export interface CellRunner {
  execute(code: string): Promise<CellReply>;
  interrupt(): unknown;
  close(): unknown;
}

/** How a cell ended. */
export interface CellReply {
  readonly status: "ok" | "error" | "aborted";
  readonly execution_count: number;
  readonly ename?: string;
  readonly evalue?: string;
}

/** A cell that failed, and with that ended the run. */
export interface Failure {
  /** Its place among all cells, from 1. */
  readonly cell: number;
  /** Its execution number, as the notebook shows it in brackets. */
  readonly execution: number;
  readonly message: string;
  /** How many code cells after it were not run. */
  readonly left: number;
}

/** A notebook after a run from start to end. */
export interface Rerun {
  readonly notebook: Notebook;
  readonly failure?: Failure;
}

/** Options of a rerun. */
export interface RerunOptions {
  /** The longest a cell may take, in seconds; no limit by default. */
  readonly timeout?: number;
  /** Called before each code cell with its place among all cells, from 1, and their number. */
  readonly before?: (cell: number, of: number) => void;
  /** Ends the run at the present cell when aborted. */
  readonly signal?: AbortSignal;
}

/**
 * Runs a notebook's code cells in order in one fresh session, and returns the notebook with the outputs of this run
 * and none of an earlier one. Stops at the first cell that fails, unless the cell carries the tag `raises-exception`
 * (by which a notebook says that a failure is meant).
 *
 * @param open opens the session; what it sends goes to the function that it is given
 */
export async function rerun(
  notebook: Notebook,
  open: (emit: (sent: Sent) => void) => Promise<CellRunner>,
  options: RerunOptions = {},
): Promise<Rerun> {
  const cells = notebook.cells.map(blank);
  const collector = new Collector();
  const session = await open((sent) => collector.take(sent));
  const stop = () => void session.interrupt();
  options.signal?.addEventListener("abort", stop);
  const watchdog = options.timeout === undefined ? undefined : startWatchdog(options.timeout, stop);
  let failure: Failure | undefined;
  try {
    for (const [at, cell] of cells.entries()) {
      if (cell.cell_type !== "code") continue;
      options.before?.(at + 1, cells.length);
      cell.outputs = collector.begin();
      const source = joined(cell.source);
      if (source.trim() === "") continue;
      watchdog?.watch(`Cell ${at + 1}`);
      const reply = await session.execute(source);
      const late = watchdog?.rest() ?? false;
      cell.execution_count = reply.execution_count;
      if (reply.status === "ok" && !options.signal?.aborted) continue;
      if (!late && !options.signal?.aborted && allowsFailure(cell)) continue;
      const said = [reply.ename, reply.evalue].filter(Boolean).join(": ") || reply.status;
      failure = {
        cell: at + 1,
        execution: reply.execution_count,
        message: late ? `it ran longer than ${options.timeout} s and was interrupted` : said,
        left: cells.slice(at + 1).filter((later) => later.cell_type === "code").length,
      };
      break;
    }
  } finally {
    options.signal?.removeEventListener("abort", stop);
    await watchdog?.close();
    await session.close();
  }
  const result = { ...notebook, metadata: withKernel(notebook.metadata), cells };
  return failure ? { notebook: result, failure } : { notebook: result };
}

/** A copy without outputs: what a run does not reach must not look as if it came from this run. */
function blank(cell: Cell): Cell {
  if (cell.cell_type !== "code") return { ...cell };
  return { ...cell, outputs: [], execution_count: null };
}

function allowsFailure(cell: Cell): boolean {
  const tags = cell.metadata["tags"];
  return Array.isArray(tags) && tags.includes("raises-exception");
}

/** What the kernel says of its language, which Jupyter writes into every notebook that it runs. */
export const languageInfo = {
  name: "typescript",
  version: "5.0.4",
  mimetype: "text/x-typescript",
  file_extension: ".ts",
  pygments_lexer: "typescript",
  codemirror_mode: { name: "javascript", typescript: true },
  nbconvert_exporter: "script",
};

function withKernel(metadata: Record<string, unknown>): Record<string, unknown> {
  return {
    ...metadata,
    kernelspec: { name: "lagbook", display_name: "Lagbook", language: "typescript" },
    language_info: languageInfo,
  };
}
