import { copyFileSync, mkdirSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { homedir } from "node:os";
import { join, resolve } from "node:path";
import { packageRoot } from "./places.js";
import { kernelName, kernelSpecification } from "./specification.js";

/**
 * Writes the kernel's specification and logos into a Jupyter data folder, replacing an earlier registration.
 *
 * @param dataFolder a folder that Jupyter searches, such as `<prefix>/share/jupyter`
 * @returns the folder of the specification, `<dataFolder>/kernels/lagbook`
 */
export function register(dataFolder: string, root: string = packageRoot): string {
  const folder = join(dataFolder, "kernels", kernelName);
  rmSync(folder, { recursive: true, force: true });
  mkdirSync(folder, { recursive: true });
  writeFileSync(join(folder, "kernel.json"), `${JSON.stringify(kernelSpecification(root), null, 2)}\n`);
  const logos = join(root, "kernel", "install", "logos");
  for (const file of readdirSync(logos)) {
    if (file.startsWith("logo-")) copyFileSync(join(logos, file), join(folder, file));
  }
  return folder;
}

/** The data folder of an environment or installation prefix. */
export function prefixDataFolder(prefix: string): string {
  return join(resolve(prefix), "share", "jupyter");
}

/** The user's own Jupyter data folder, by the rules that Jupyter documents for each system. */
export function userDataFolder(
  environment: NodeJS.ProcessEnv = process.env,
  platform: NodeJS.Platform = process.platform,
  home: string = homedir(),
): string {
  if (environment["JUPYTER_DATA_DIR"]) return environment["JUPYTER_DATA_DIR"];
  if (platform === "darwin") return join(home, "Library", "Jupyter");
  if (platform === "win32") {
    const roaming = environment["APPDATA"];
    return roaming ? join(roaming, "jupyter") : join(home, ".jupyter", "data");
  }
  return join(environment["XDG_DATA_HOME"] || join(home, ".local", "share"), "jupyter");
}
