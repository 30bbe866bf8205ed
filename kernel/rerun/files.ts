import { mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { basename, dirname, resolve } from "node:path";
import type { Sent } from "./collector.js";
import { parseNotebook, writeNotebook } from "./notebook.js";
import { notebookToPage } from "./page/page.js";
import { type CellRunner, type Rerun, type RerunOptions, rerun } from "./rerun.js";

/** Opens a session in a folder. */
export type OpenSession = (folder: string, emit: (sent: Sent) => void) => Promise<CellRunner>;

/** Where the files of a rerun go. */
export interface RerunFiles {
  /** The executed notebook; not written if left out. */
  readonly executed?: string;
  /** The page; not written if left out. */
  readonly page?: string;
}

/**
 * Runs a notebook file from start to end, in its own folder, and writes the executed notebook and a page of it. Both
 * are written if a cell fails too: they show how far the run came.
 *
 * @throws NotebookError if the file is no notebook
 */
export async function rerunFile(
  file: string,
  open: OpenSession,
  files: RerunFiles,
  options: RerunOptions & { maker: string },
): Promise<Rerun> {
  const path = resolve(file);
  const name = basename(path);
  const folder = dirname(path);
  const notebook = parseNotebook(readFileSync(path, "utf8"), name);
  const run = await rerun(notebook, (emit) => open(folder, emit), options);
  if (files.executed !== undefined) write(files.executed, writeNotebook(run.notebook));
  if (files.page !== undefined) {
    const { maker } = options;
    const failed = run.failure ? { failure: run.failure } : {};
    write(files.page, notebookToPage(run.notebook, { name, folder, maker, ...failed }));
  }
  return run;
}

function write(path: string, text: string): void {
  mkdirSync(dirname(resolve(path)), { recursive: true });
  writeFileSync(path, text);
}
