import { spawn } from "node:child_process";

/** How a command ended, and what it printed. */
export interface CommandEnd {
  /** The exit code; 127 if the command was not found. */
  readonly code: number;
  /** Standard output and standard error as they came. */
  readonly text: string;
}

/** Runs a command to its end, gathering what it prints. Never throws: a command that is not there ends with 127. */
export function run(
  command: string,
  args: readonly string[],
  options: { cwd?: string; env?: NodeJS.ProcessEnv } = {},
): Promise<CommandEnd> {
  return new Promise((settle) => {
    const pieces: string[] = [];
    const child = spawn(command, args, { ...options, stdio: ["ignore", "pipe", "pipe"] });
    child.stdout.setEncoding("utf8").on("data", (text: string) => pieces.push(text));
    child.stderr.setEncoding("utf8").on("data", (text: string) => pieces.push(text));
    child.on("error", (problem) => settle({ code: 127, text: `${pieces.join("")}${problem.message}` }));
    child.on("close", (code) => settle({ code: code ?? 1, text: pieces.join("") }));
  });
}

/** The last lines of a text, indented, for a message. */
export function tail(text: string, lines: number): string {
  return text
    .trimEnd()
    .split("\n")
    .slice(-lines)
    .map((line) => `  ${line}`)
    .join("\n");
}
