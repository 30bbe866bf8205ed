import { existsSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

function findPackageRoot(): string {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(folder, "package.json"))) folder = dirname(folder);
  return folder;
}

/** Lagbook's own top folder: the checkout, or the installed package. */
export const packageRoot = findPackageRoot();

/** Where set-up and JupyterLab may write. All of it is inside one checkout. */
export interface Places {
  /** The checkout. */
  readonly root: string;
  /** The notebooks that `lagbook start` opens. */
  readonly notebooks: string;
  /** The Python environment. */
  readonly environment: string;
  /** That environment's interpreter (which need not exist yet). */
  readonly python: string;
  /** Everything else that Lagbook writes: JupyterLab's settings, logs, pages. */
  readonly state: string;
}

/** The places of a checkout. */
export function places(root: string = packageRoot): Places {
  const environment = join(root, ".venv");
  return {
    root,
    notebooks: join(root, "notebooks-demo"),
    environment,
    python:
      process.platform === "win32"
        ? join(environment, "Scripts", "python.exe")
        : join(environment, "bin", "python"),
    state: join(root, ".lagbook"),
  };
}
