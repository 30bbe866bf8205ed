import { mkdirSync, writeFileSync } from "node:fs";
import { delimiter, join } from "node:path";
import { register } from "./register.js";
import { kernelName } from "./specification.js";

/** How a JupyterLab is to be started. */
export interface LabOptions {
  /** The folder whose notebooks it shows. */
  readonly notebooks: string;
  /** The notebook to open first, a path inside that folder. */
  readonly first?: string;
  /** The port; with none given, the first free one from Jupyter's usual port on. */
  readonly port?: number;
  /** Whether it opens a browser itself. */
  readonly browser: boolean;
}

/** The folder of a prepared home in which a running server leaves word of its port and token. */
export function runtimeFolder(home: string): string {
  return join(home, "runtime");
}

/**
 * Lays out a folder as a Jupyter home of its own (settings, data, runtime files, and Lagbook's kernel registered), so
 * that a Jupyter started with the returned environment writes nothing into the user's own folders.
 *
 * @param home the folder, made if absent
 * @param outer the environment to build on
 */
export function prepareHome(home: string, outer: NodeJS.ProcessEnv = process.env): NodeJS.ProcessEnv {
  const data = join(home, "data");
  const config = join(home, "config");
  for (const folder of [data, config, runtimeFolder(home), join(config, "labconfig")]) {
    mkdirSync(folder, { recursive: true });
  }
  register(data);
  // JupyterLab's announcements ask a server on the network for news; nothing here calls home.
  const pageConfiguration = {
    disabledExtensions: { "@jupyterlab/apputils-extension:announcements": true },
  };
  writeFileSync(join(config, "labconfig", "page_config.json"), JSON.stringify(pageConfiguration, null, 2));
  return {
    ...outer,
    JUPYTER_CONFIG_DIR: config,
    JUPYTER_DATA_DIR: data,
    JUPYTER_RUNTIME_DIR: runtimeFolder(home),
    JUPYTER_PATH: [data, outer["JUPYTER_PATH"]].filter(Boolean).join(delimiter),
    JUPYTERLAB_SETTINGS_DIR: join(config, "lab", "user-settings"),
    JUPYTERLAB_WORKSPACES_DIR: join(config, "lab", "workspaces"),
    IPYTHONDIR: join(home, "ipython"),
    MPLCONFIGDIR: join(home, "matplotlib"),
    // One of the server's extensions calls npm, which would write its log into the user's folder.
    npm_config_cache: join(home, "npm"),
  };
}

/** The arguments to Python that start JupyterLab. */
export function labArguments(options: LabOptions, user: number | undefined = process.getuid?.()): string[] {
  const args = ["-m", "jupyterlab", `--ServerApp.root_dir=${options.notebooks}`];
  args.push(`--MultiKernelManager.default_kernel_name=${kernelName}`);
  if (options.first !== undefined) {
    const path = options.first.split("/").map(encodeURIComponent).join("/");
    args.push(`--LabApp.default_url=/lab/tree/${path}`);
  }
  // A port that was asked for by number is taken or refused, never another one instead.
  if (options.port !== undefined) args.push(`--port=${options.port}`, "--ServerApp.port_retries=0");
  if (!options.browser) args.push("--no-browser");
  if (user === 0) args.push("--allow-root");
  return args;
}
