import { existsSync, readdirSync, statSync } from "node:fs";
import { join, relative } from "node:path";
import { ensureEnvironment, SetUpError } from "./environment.js";
import { canOpenBrowser } from "./opener.js";
import { type Places, places } from "./places.js";
import { type RunningLab, startLab } from "./server.js";

/** What `lagbook start` was asked for. */
export interface StartOptions {
  readonly port?: number;
  /** Open a browser window; by default where one can open. */
  readonly browser?: boolean;
  /** Write the pages and start no JupyterLab. */
  readonly pages?: boolean;
  readonly at?: Places;
  readonly say?: (line: string) => void;
  /** Runs a notebook with no Jupyter, writes the executed notebook and a page, and says where and how it went. */
  readonly runToPage: (notebook: string, executed: string, page: string) => Promise<boolean>;
}

/**
 * Opens JupyterLab on the demo notebooks, setting up what it needs inside the checkout. Where that can't be had (no
 * Python, no network) it runs the notebooks itself, writes them and a page of each, and says what is missing.
 *
 * @returns the exit code
 */
export async function start(options: StartOptions): Promise<number> {
  const at = options.at ?? places();
  const say = options.say ?? ((line: string) => console.log(line));
  if (options.pages) return writePages(at, say, options.runToPage);
  let python: string;
  try {
    python = await ensureEnvironment(at, "jupyterlab", say);
  } catch (problem) {
    if (!(problem instanceof SetUpError)) throw problem;
    say(`No JupyterLab here. Missing: ${problem.message}.`);
    if (problem.details) say(problem.details);
    say("Running the notebooks without it.");
    const code = await writePages(at, say, options.runToPage);
    say("For JupyterLab, provide what is missing, be online once, and run npm start again.");
    return code;
  }
  const first = notebooksIn(at.notebooks)[0];
  const lab = await startLab(python, join(at.state, "jupyter"), {
    notebooks: at.notebooks,
    browser: options.browser ?? canOpenBrowser(),
    ...(first === undefined ? {} : { first }),
    ...(options.port === undefined ? {} : { port: options.port }),
  });
  say(`JupyterLab is open on ${relative(at.root, at.notebooks) || at.notebooks}:`);
  say(
    `  ${lab.base}lab${first === undefined ? "" : `/tree/${encodeURIComponent(first)}`}?token=${lab.token}`,
  );
  say(`Its log: ${relative(process.cwd(), lab.log)}. Stop it with Ctrl-C.`);
  return untilStopped(lab, say);
}

/** The names of the notebooks of a folder: `ferry.ipynb`, the one to begin with, then the others by name. */
export function notebooksIn(folder: string): string[] {
  if (!existsSync(folder)) return [];
  return readdirSync(folder)
    .filter((name) => name.endsWith(".ipynb") && statSync(join(folder, name)).isFile())
    .sort((a, b) => Number(b === "ferry.ipynb") - Number(a === "ferry.ipynb") || (a < b ? -1 : 1));
}

async function untilStopped(lab: RunningLab, say: (line: string) => void): Promise<number> {
  let asked = false;
  const stop = () => {
    // Jupyter puts a question to the terminal at the first interrupt; ending it is what was asked for here.
    asked = true;
    lab.process.kill("SIGTERM");
  };
  const signals = ["SIGINT", "SIGTERM", "SIGHUP"] as const;
  for (const signal of signals) process.on(signal, stop);
  const code = await lab.ended;
  for (const signal of signals) process.off(signal, stop);
  if (asked) {
    say("JupyterLab has stopped.");
    return 0;
  }
  if (code !== 0) say(`JupyterLab ended with code ${code}; see ${lab.log}.`);
  return code;
}

async function writePages(
  at: Places,
  say: (line: string) => void,
  runToPage: StartOptions["runToPage"],
): Promise<number> {
  const folder = join(at.state, "pages");
  const names = notebooksIn(at.notebooks);
  if (names.length === 0) {
    say(`There is no notebook in ${at.notebooks}.`);
    return 1;
  }
  let sound = true;
  for (const name of names) {
    const stem = name.slice(0, -".ipynb".length);
    const executed = join(folder, name);
    const page = join(folder, `${stem}.html`);
    const passed = await runToPage(join(at.notebooks, name), executed, page);
    sound &&= passed;
  }
  return sound ? 0 : 1;
}
