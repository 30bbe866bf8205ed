import { ts } from "./compiler/typescript.js";

/** Whether a cell could run as it stands; `indent` for the next line when it goes on. */
export interface Completeness {
  readonly status: "complete" | "incomplete" | "invalid";
  readonly indent?: string;
}

/** Decided by the parser: an error at the very end means that more is to come, an earlier one that it is wrong. */
export function isComplete(code: string): Completeness {
  const file = ts.createSourceFile(
    "cell.ts",
    code,
    ts.ScriptTarget.Latest,
    true,
    ts.ScriptKind.TS,
  ) as unknown as {
    parseDiagnostics: readonly { start: number; length: number; code: number }[];
  };
  const problems = file.parseDiagnostics;
  if (problems.length === 0) return { status: "complete" };
  const end = code.trimEnd().length;
  const unterminated = new Set([1002, 1010, 1126, 1160, 1161]); // string, comment, end of text, template, regular expression
  const last = problems[0]!;
  const atEnd = last.start >= end || (unterminated.has(last.code) && last.code !== 1002);
  if (!atEnd) return { status: "invalid" };
  const line = code.split("\n").pop() ?? "";
  const indent = /^\s*/.exec(line)![0] + (/[{([]\s*$/.test(line) ? "  " : "");
  return { status: "incomplete", indent };
}
