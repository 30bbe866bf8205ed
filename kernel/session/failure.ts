import { inspected } from "./bundle.js";
import type { Problem } from "./compiler/compiler.js";
import { Interrupted, isInterrupted } from "./interruption.js";

/** How a cell failed, as the messaging protocol writes it. */
export interface CellFailure {
  readonly ename: string;
  readonly evalue: string;
  readonly traceback: string[];
}

/** Type errors of a cell: each with its line and a caret under the place. */
export function typeFailure(problems: readonly Problem[], source: string): CellFailure {
  const lines = source.split("\n");
  const traceback = problems.flatMap((problem) => {
    const place = problem.file ? `${problem.file}, line ${problem.line + 1}` : `line ${problem.line + 1}`;
    const head = `${place}: ${problem.message}`;
    const line = problem.file ? undefined : lines[problem.line];
    return line === undefined ? [head] : [head, ...pointed(line, problem.character, problem.length)];
  });
  return { ename: "TypeScript", evalue: problems[0]!.message, traceback };
}

function pointed(line: string, character: number, length: number): string[] {
  const lead = line.slice(0, character).replace(/[^\t]/g, " ");
  return [`    ${line}`, `    ${lead}${"^".repeat(Math.max(1, Math.min(length, line.length - character)))}`];
}

/** Maps a place in a compiled cell to the user's source. */
export interface CellScript {
  readonly source: string;
  readonly name: string;
  sourceLine(line: number, character: number): number | undefined;
}

/** What a cell threw, with the lines of cells that led to it and nothing of the kernel's. */
export function thrownFailure(thrown: unknown, scripts: ReadonlyMap<string, CellScript>): CellFailure {
  if (isInterrupted(thrown)) {
    const { name: ename, message: evalue } = new Interrupted();
    return { ename, evalue, traceback: [`${ename}: ${evalue}`] };
  }
  if (!isError(thrown)) {
    const evalue = typeof thrown === "string" ? thrown : inspected(thrown);
    return { ename: "Thrown", evalue, traceback: [`Thrown: ${evalue}`] };
  }
  const head = `${thrown.name}: ${thrown.message}`;
  return {
    ename: thrown.name,
    evalue: thrown.message,
    traceback: [head, ...frames(thrown, scripts), ...causes(thrown)],
  };
}

function isError(thrown: unknown): thrown is Error {
  return typeof thrown === "object" && thrown !== null && "message" in thrown && "name" in thrown;
}

function causes(error: Error): string[] {
  const { cause, errors } = error as Error & { errors?: unknown };
  const several = Array.isArray(errors) ? errors.filter(isError).slice(0, 5) : [];
  return [
    ...several.map(({ name, message }) => `  - ${name}: ${message}`),
    ...(isError(cause) ? [`  caused by ${cause.name}: ${cause.message}`] : []),
  ];
}

function frames(error: Error, scripts: ReadonlyMap<string, CellScript>): string[] {
  const lines: string[] = [];
  let before = "";
  for (const frame of (error.stack ?? "").split("\n")) {
    const found = /^\s+at .*?(lagbook-cell-\d+\.js):(\d+)(?::(\d+))?/.exec(frame);
    const script = found ? scripts.get(found[1]!) : undefined;
    if (!found || !script) continue;
    const line = script.sourceLine(Number(found[2]) - 1, Number(found[3] ?? 1) - 1);
    if (line === undefined) continue;
    const place = `  ${script.name}, line ${line + 1}`;
    if (place === before) continue;
    before = place;
    lines.push(place);
    const text = script.source.split("\n")[line];
    if (text !== undefined) lines.push(`    ${text.trim()}`);
  }
  return lines;
}
