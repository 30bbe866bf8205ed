#!/usr/bin/env node
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { Command, InvalidArgumentError, Option } from "commander";
import { packageRoot } from "./install/index.js";

// Every command loads its room when it is called: a kernel starts in the time that it needs itself.

const { version } = JSON.parse(readFileSync(join(packageRoot, "package.json"), "utf8")) as {
  version: string;
};
const maker = `Lagbook ${version}`;

const program = new Command("lagbook")
  .description("A TypeScript notebook kernel for regression on time-ordered data.")
  .version(version, "-V, --version", "print the version")
  .helpOption("-h, --help", "print this help, or a command's")
  .helpCommand("help [command]", "print the help of a command")
  .showSuggestionAfterError()
  .addHelpText(
    "after",
    `
Examples:
  lagbook start                                   JupyterLab on the demo notebooks
  lagbook run report.ipynb --html report.html     run a notebook, write a page of it
  lagbook install --user                          add the kernel to the Jupyter you have`,
  );

program
  .command("start")
  .description(
    "open JupyterLab on the demo notebooks, set up inside this folder; without it, write their pages",
  )
  .option(
    "-p, --port <number>",
    "the port of JupyterLab (default: the first free one from 8888 on)",
    wholePort,
  )
  .option("--no-browser", "print the address and open no browser window")
  .option("--pages", "start no JupyterLab: run the notebooks and write a page of each")
  .action(async (options: { port?: number; browser: boolean; pages?: boolean }) => {
    const { start } = await import("./install/index.js");
    process.exitCode = await start({
      ...(options.port === undefined ? {} : { port: options.port }),
      ...(options.browser ? {} : { browser: false }),
      pages: options.pages ?? false,
      runToPage: async (notebook, executed, page) =>
        (await run([notebook], { html: page, output: executed })) === 0,
    });
  });

program
  .command("run")
  .description("run notebooks from their first cell to their last, with no Jupyter")
  .argument("<notebook...>", "notebook files (.ipynb); each runs in its own folder")
  .option("--html <path>", "write a page that stands by itself; a folder, if there are several notebooks")
  .option("--output <path>", "write the executed notebook; a folder, if there are several notebooks")
  .option("--timeout <seconds>", "interrupt a cell that takes longer", positive)
  .addHelpText(
    "after",
    `
A notebook stops at the first cell that fails; what was asked for is written all the same. A cell with the tag
raises-exception may fail. Exit code: 0 every cell ran, 1 a cell failed, 2 a file is no notebook.`,
  )
  .action(async (notebooks: string[], options: { html?: string; output?: string; timeout?: number }) => {
    process.exitCode = await run(notebooks, options);
  });

program
  .command("install")
  .description("register the kernel with a Jupyter that is already there")
  .addOption(new Option("--user", "for this user (the default)").conflicts("prefix"))
  .option("--prefix <folder>", "for the environment in a folder, such as a virtual environment or /usr/local")
  .action(async (options: { user?: boolean; prefix?: string }) => {
    const { prefixDataFolder, register, userDataFolder } = await import("./install/index.js");
    const data = options.prefix === undefined ? userDataFolder() : prefixDataFolder(options.prefix);
    console.log(`Registered in ${register(data)}. To undo it, remove that folder.`);
  });

program
  .command("kernel")
  .description("run as a notebook's kernel (Jupyter calls this)")
  .argument("<connection-file>", "the file with the ports and the key, written by Jupyter")
  .action(async (file: string) => {
    const { startKernel } = await import("./wire/index.js");
    await startKernel(file);
  });

async function run(
  notebooks: readonly string[],
  options: { html?: string; output?: string; timeout?: number },
): Promise<number> {
  const { runNotebooks } = await import("./rerun/index.js");
  const { createSession } = await import("./session/index.js");
  const stop = new AbortController();
  const interrupted = () => {
    if (stop.signal.aborted) process.exit(130); // asked twice
    stop.abort();
  };
  process.on("SIGINT", interrupted);
  try {
    return await runNotebooks({
      notebooks,
      ...options,
      maker,
      signal: stop.signal,
      open: (directory, emit) => createSession({ directory, emit }),
    });
  } finally {
    process.off("SIGINT", interrupted);
  }
}

function wholePort(text: string): number {
  const port = Number(text);
  if (Number.isInteger(port) && port >= 1 && port <= 65535) return port;
  throw new InvalidArgumentError("A port is a whole number from 1 to 65535.");
}

function positive(text: string): number {
  const seconds = Number(text);
  if (Number.isFinite(seconds) && seconds > 0) return seconds;
  throw new InvalidArgumentError("A time is a number of seconds above 0.");
}

try {
  await program.parseAsync();
} catch (problem) {
  console.error(`lagbook: ${(problem as Error).message}`);
  process.exitCode = 1;
}
