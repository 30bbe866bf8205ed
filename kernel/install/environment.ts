import { run, tail } from "./command.js";
import type { Places } from "./places.js";
import { findPython } from "./python.js";
import { missingPackages, type RequirementSet, requirementsFile } from "./requirements.js";

/** The Python environment could not be set up. The message says what is missing, and for a log, `details` why. */
export class SetUpError extends Error {
  constructor(
    message: string,
    /** What the failing command printed last. */
    readonly details: string = "",
  ) {
    super(message);
    this.name = "SetUpError";
  }
}

/**
 * Makes sure that the checkout's `.venv` has the pinned packages: keeps it if it has, mends it if it runs, makes it
 * otherwise. Writes nothing outside the checkout (pip's cache is switched off for that reason).
 *
 * @returns the environment's interpreter
 * @throws SetUpError if there is no Python, or pip can't install (no network, say)
 */
export async function ensureEnvironment(
  at: Places,
  set: RequirementSet,
  say: (line: string) => void,
): Promise<string> {
  const file = requirementsFile(set, at.root);
  const missing = await missingPackages(at.python, file);
  if (missing?.length === 0) return at.python;

  let installer = [at.python, "-m", "pip"];
  if (missing === undefined) installer = await makeEnvironment(at, say);
  else if ((await run(at.python, ["-m", "pip", "--version"])).code !== 0) installer = await outerPip(at);

  say(`Installing ${set === "tests" ? "JupyterLab and the tests' packages" : "JupyterLab"} into .venv ...`);
  const [command, ...before] = installer as [string, ...string[]];
  const pip = await run(command, [
    ...before,
    ...["install", "--no-cache-dir", "--prefer-binary", "--no-input", "--disable-pip-version-check"],
    ...["--progress-bar", "off", "--requirement", file],
  ]);
  if (pip.code !== 0) {
    const errors = pip.text.split("\n").filter((line) => line.startsWith("ERROR"));
    throw new SetUpError(
      "JupyterLab's packages, which pip could not install (is there a network?)",
      tail(errors.length > 0 ? errors.join("\n") : pip.text, 4),
    );
  }
  const still = await missingPackages(at.python, file);
  if (still === undefined || still.length > 0) {
    throw new SetUpError("the packages in .venv are not the pinned ones", (still ?? []).join("\n"));
  }
  return at.python;
}

async function makeEnvironment(at: Places, say: (line: string) => void): Promise<string[]> {
  const search = await findPython();
  if (!search.python) throw new SetUpError(search.problem!);
  say("Making a Python environment in .venv ...");
  const usual = await run(search.python, ["-m", "venv", "--clear", at.environment]);
  if (usual.code === 0) return [at.python, "-m", "pip"];
  // Some systems split the bundled pip off Python; an environment without pip can be filled by the outer one.
  const bare = await run(search.python, ["-m", "venv", "--clear", "--without-pip", at.environment]);
  if (bare.code !== 0) {
    throw new SetUpError("Python's venv module (on Debian the package python3-venv)", tail(usual.text, 6));
  }
  return outerPip(at);
}

async function outerPip(at: Places): Promise<string[]> {
  const { python } = await findPython();
  if (python && (await run(python, ["-m", "pip", "--version"])).code === 0) {
    return [python, "-m", "pip", "--python", at.python];
  }
  throw new SetUpError("pip (on Debian the packages python3-venv and python3-pip)");
}
