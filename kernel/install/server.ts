import { type ChildProcess, spawn } from "node:child_process";
import { closeSync, openSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { setTimeout as pause } from "node:timers/promises";
import { tail } from "./command.js";
import { type LabOptions, labArguments, prepareHome, runtimeFolder } from "./jupyter.js";

/** A JupyterLab that answers. */
export interface RunningLab {
  /** The address of the server, ending in a slash. */
  readonly base: string;
  readonly token: string;
  /** The file that its log goes to. */
  readonly log: string;
  readonly process: ChildProcess;
  /** Resolves with the exit code when the server has ended. */
  readonly ended: Promise<number>;
}

/**
 * Starts a JupyterLab in a Jupyter home of its own and waits until it answers.
 *
 * @param python an interpreter that has JupyterLab
 * @param home the folder for everything that Jupyter writes; its log is `jupyterlab.log` in there
 * @throws Error with the last lines of the log if the server ends, or does not answer within the time
 */
export async function startLab(
  python: string,
  home: string,
  options: LabOptions,
  { environment = process.env, seconds = 90, extra = [] as readonly string[] } = {},
): Promise<RunningLab> {
  const inner = prepareHome(home, environment);
  const log = join(home, "jupyterlab.log");
  const sink = openSync(log, "w");
  const child = spawn(python, [...labArguments(options), ...extra], {
    cwd: options.notebooks,
    env: inner,
    stdio: ["ignore", sink, sink],
  });
  closeSync(sink);
  let code: number | undefined;
  const ended = new Promise<number>((settle) => {
    child.on("error", () => settle(127));
    child.on("exit", (status) => settle(status ?? 1));
  });
  void ended.then((status) => {
    code = status;
  });
  // A server outlives its parent unless it is told: no orphan keeps the port.
  const stop = () => child.kill("SIGTERM");
  process.once("exit", stop);
  void ended.then(() => process.off("exit", stop));

  const word = join(runtimeFolder(home), `jpserver-${child.pid}.json`);
  for (let waited = 0; waited < seconds * 10; waited++) {
    if (code !== undefined) break;
    const lab = await answering(word);
    if (lab) return { ...lab, log, process: child, ended };
    await pause(100);
  }
  stop();
  const problem = code === undefined ? `did not answer within ${seconds} s` : `ended with code ${code}`;
  throw new Error(`JupyterLab ${problem}. Its log (${log}) ends:\n${tail(readFileSync(log, "utf8"), 12)}`);
}

async function answering(word: string): Promise<{ base: string; token: string } | undefined> {
  try {
    const { url, token } = JSON.parse(readFileSync(word, "utf8")) as { url: string; token: string };
    const reply = await fetch(`${url}api/status`, { headers: { Authorization: `token ${token}` } });
    return reply.ok ? { base: url, token } : undefined;
  } catch {
    return undefined; // not there yet, or half written
  }
}
