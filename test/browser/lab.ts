import { cpSync, mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { setTimeout as pause } from "node:timers/promises";
import { type Browser, type BrowserContextOptions, chromium, type Page } from "playwright-core";
import { places, type RunningLab, startLab } from "../../kernel/install/index.js";
import { findChromium } from "../machine/chromium.js";
import { python } from "../machine/needs.js";
import { root } from "../root.js";

const flags = [
  ...["--no-sandbox", "--headless", "--disable-gpu", "--disable-quic", "--no-first-run"],
  ...["--disable-background-networking", "--disable-component-update", "--disable-sync"],
];

/** A Chromium of our own. */
export function openChromium(): Promise<Browser> {
  return chromium.launch({ executablePath: findChromium()!, args: flags });
}

/** A page in which functions of a test file run, whether that is run from its source or from dist/. */
export async function newPage(browser: Browser, options: BrowserContextOptions = {}): Promise<Page> {
  const page = await browser.newPage(options);
  // What runs TypeScript from its source marks inner functions by a call of this name, which pages lack.
  await page.addInitScript("globalThis.__name ??= (inner) => inner");
  return page;
}

/** A Jupyter server in folders of its own, on a free port, with copies of notebooks to work on. */
export interface IsolatedLab {
  readonly server: RunningLab;
  /** The server's root: what tests put here can be opened. */
  readonly notebooks: string;
  /** The home folder that the server and its kernels are given. */
  readonly home: string;
  close(): Promise<void>;
}

/**
 * Starts a JupyterLab for one test file.
 *
 * @param folder the notebooks to copy, with everything beside them
 */
export async function isolatedLab(folder: string): Promise<IsolatedLab> {
  const parent = join(places().state, "test");
  mkdirSync(parent, { recursive: true });
  const scratch = mkdtempSync(join(parent, "lab-"));
  const home = join(scratch, "home");
  const jupyter = join(scratch, "jupyter");
  const notebooks = join(scratch, "notebooks");
  mkdirSync(home);
  cpSync(folder, notebooks, {
    recursive: true,
    filter: (path) => !/\.ipynb_checkpoints/.test(path),
  });
  // Cells out of sight are drawn too, so that a test can look at all of them.
  const settings = join(jupyter, "config", "lab", "user-settings", "@jupyterlab", "notebook-extension");
  mkdirSync(settings, { recursive: true });
  writeFileSync(join(settings, "tracker.jupyterlab-settings"), JSON.stringify({ windowingMode: "none" }));
  const server = await startLab(
    python,
    jupyter,
    { notebooks, browser: false },
    {
      environment: { ...process.env, HOME: home, XDG_DATA_HOME: "", XDG_CONFIG_HOME: "", XDG_CACHE_HOME: "" },
      extra: ["--expose-app-in-browser", "--LabApp.extension_manager=readonly"],
    },
  );
  return {
    server,
    notebooks,
    home,
    async close() {
      server.process.kill("SIGTERM");
      await Promise.race([server.ended, pause(10_000)]);
      server.process.kill("SIGKILL");
      rmSync(scratch, { recursive: true, force: true });
    },
  };
}

/** A page of JupyterLab with one notebook open, and everything untoward that it said. */
export interface OpenNotebook {
  readonly page: Page;
  /** Console errors, uncaught exceptions and dialogs, as they came. */
  readonly complaints: string[];
}

/** Opens a notebook and waits until its kernel is at rest. */
export async function openNotebook(
  browser: Browser,
  lab: IsolatedLab,
  path: string,
  viewport = { width: 1280, height: 900 },
): Promise<OpenNotebook> {
  const page = await newPage(browser, { viewport });
  const complaints: string[] = [];
  page.on("console", (message) => {
    if (message.type() === "error") complaints.push(`console: ${message.text()} (${message.location().url})`);
  });
  page.on("pageerror", (error) => complaints.push(`exception: ${error.message}`));
  page.on("dialog", (dialog) => {
    complaints.push(`dialog: ${dialog.message()}`);
    void dialog.dismiss();
  });
  const { base, token } = lab.server;
  await page.goto(`${base}lab/tree/${encodeURIComponent(path)}?token=${token}&reset`);
  await page
    .locator(".jp-NotebookPanel:not(.lm-mod-hidden) .jp-Notebook .jp-Cell")
    .first()
    .waitFor({ timeout: 60_000 });
  await kernelAtRest(page);
  return { page, complaints };
}

// What is used of JupyterLab's own objects in the page.
interface LabWindow {
  jupyterapp: {
    commands: { execute(id: string, args?: object): Promise<unknown> };
    shell: {
      currentWidget: {
        sessionContext: { kernelDisplayStatus: string };
        context: { save(): Promise<void> };
        content: {
          widgets: {
            model: { type: string; toJSON(): unknown; trusted: boolean; executionState?: string };
          }[];
        };
      };
    };
  };
}

async function kernelAtRest(page: Page): Promise<void> {
  await page.waitForFunction(
    () =>
      (window as unknown as LabWindow).jupyterapp?.shell.currentWidget?.sessionContext
        ?.kernelDisplayStatus === "idle",
    undefined,
    { timeout: 60_000 },
  );
}

/** Runs a command of JupyterLab by its name. */
export async function command(page: Page, id: string, args: object = {}): Promise<void> {
  await page.evaluate(
    async ([name, given]) => {
      await (window as unknown as LabWindow).jupyterapp.commands.execute(name, given);
    },
    [id, args] as const,
  );
}

/** Runs every cell by the menu, as a user does, and waits for the last. */
export async function runAll(page: Page, milliseconds = 300_000): Promise<void> {
  await page.getByRole("menuitem", { name: "Run", exact: true }).click();
  await page.getByRole("menuitem", { name: "Run All Cells", exact: true }).click();
  await page.waitForFunction(
    () => {
      const { widgets } = (window as unknown as LabWindow).jupyterapp.shell.currentWidget.content;
      return widgets.every(({ model }) => {
        if (model.type !== "code") return true;
        const cell = model.toJSON() as {
          execution_count: number | null;
          source: string;
          outputs: { output_type: string }[];
        };
        return (
          cell.source.trim() === "" ||
          cell.execution_count !== null ||
          cell.outputs.some((o) => o.output_type === "error")
        );
      });
    },
    undefined,
    { timeout: milliseconds },
  );
  await kernelAtRest(page);
  await pause(1000); // what is drawn after the last message: charts, images
}

/** A code cell as it stands in the open notebook. */
export interface ShownCell {
  readonly source: string;
  readonly trusted: boolean;
  readonly outputs: readonly {
    output_type: string;
    data?: Record<string, unknown>;
    ename?: string;
    evalue?: string;
    text?: string | string[];
  }[];
}

/** The code cells of the open notebook that hold anything. */
export async function codeCells(page: Page): Promise<ShownCell[]> {
  return page.evaluate(() => {
    const { widgets } = (window as unknown as LabWindow).jupyterapp.shell.currentWidget.content;
    return widgets
      .filter(({ model }) => model.type === "code")
      .map(({ model }) => ({ ...(model.toJSON() as object), trusted: model.trusted }) as unknown as ShownCell)
      .map((cell) => ({ ...cell, source: Array.isArray(cell.source) ? cell.source.join("") : cell.source }))
      .filter((cell) => cell.source.trim() !== "");
  });
}

/** Saves the open notebook. */
export async function save(page: Page): Promise<void> {
  await page.evaluate(() => (window as unknown as LabWindow).jupyterapp.shell.currentWidget.context.save());
}

/** Sets one of JupyterLab's two themes and waits until it is drawn. */
export async function theme(page: Page, name: "JupyterLab Light" | "JupyterLab Dark"): Promise<void> {
  await command(page, "apputils:change-theme", { theme: name });
  await page.waitForFunction((wanted) => document.body.dataset["jpThemeName"] === wanted, name);
  await pause(500);
}

/** The notebooks of notebooks-demo, by name. */
export function demoNotebooks(): string[] {
  return readdirSync(join(root, "notebooks-demo")).filter((name) => name.endsWith(".ipynb"));
}
