import { existsSync, statSync } from "node:fs";
import { basename, extname, join } from "node:path";
import { type OpenSession, type RerunFiles, rerunFile } from "./files.js";
import { NotebookError } from "./notebook.js";
import type { Rerun } from "./rerun.js";

/** What `lagbook run` was asked for. */
export interface RunCommand {
  readonly notebooks: readonly string[];
  /** The page to write; with several notebooks, the folder for their pages. */
  readonly html?: string;
  /** The executed notebook to write; with several notebooks, the folder for them. */
  readonly output?: string;
  /** The longest a cell may take, in seconds. */
  readonly timeout?: number;
  readonly maker: string;
  readonly open: OpenSession;
  readonly say?: (line: string) => void;
  readonly signal?: AbortSignal;
}

/**
 * Runs notebooks one after another and says how each went.
 *
 * @returns the exit code: 0 if every cell ran, 1 if a cell failed, 2 if a file could not be read as a notebook
 */
export async function runNotebooks(command: RunCommand): Promise<number> {
  const say = command.say ?? ((line: string) => console.log(line));
  let code = 0;
  for (const file of command.notebooks) {
    if (command.signal?.aborted) break;
    const files = filesFor(file, command);
    try {
      if (!existsSync(file)) throw new NotebookError(`there is no file ${file}`);
      const run = await rerunFile(file, command.open, files, {
        maker: command.maker,
        before: progress(basename(file)),
        ...(command.timeout === undefined ? {} : { timeout: command.timeout }),
        ...(command.signal === undefined ? {} : { signal: command.signal }),
      });
      clearProgress();
      say(`${file}: ${outcome(run)}`);
      if (files.executed) say(`  executed notebook: ${files.executed}`);
      if (files.page) say(`  page: ${files.page}`);
      if (run.failure) code = Math.max(code, 1);
    } catch (problem) {
      clearProgress();
      if (!(problem instanceof NotebookError)) throw problem;
      say(`run: ${problem.message}`);
      code = 2;
    }
  }
  return code;
}

function outcome({ notebook, failure }: Rerun): string {
  const ran = notebook.cells.filter((cell) => cell.execution_count != null).length;
  if (!failure) return `${ran} code ${ran === 1 ? "cell" : "cells"} ran`;
  const rest = failure.left === 0 ? "" : ` (${failure.left} after it not run)`;
  return `cell ${failure.cell} [${failure.execution}] failed${rest}: ${failure.message}`;
}

function filesFor(file: string, { html, output, notebooks }: RunCommand): RerunFiles {
  const stem = basename(file, ".ipynb");
  const place = (target: string, name: string, ending: string) =>
    notebooks.length > 1 || isFolder(target) || extname(target) !== ending ? join(target, name) : target;
  return {
    ...(output === undefined ? {} : { executed: place(output, `${stem}.ipynb`, ".ipynb") }),
    ...(html === undefined ? {} : { page: place(html, `${stem}.html`, ".html") }),
  };
}

function isFolder(path: string): boolean {
  return existsSync(path) && statSync(path).isDirectory();
}

function progress(name: string): (cell: number, of: number) => void {
  return (cell, of) => {
    if (process.stderr.isTTY) process.stderr.write(`\r\x1b[K${name}: cell ${cell} of ${of}`);
  };
}

function clearProgress(): void {
  if (process.stderr.isTTY) process.stderr.write("\r\x1b[K");
}
