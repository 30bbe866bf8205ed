import { run } from "./command.js";

/** The oldest Python for which the pinned packages exist. */
export const oldestPython: readonly [number, number] = [3, 11];

const question = "import sys; print(f'{sys.version_info[0]}.{sys.version_info[1]}')";

/** The version of an interpreter, or undefined if it does not run. */
export async function pythonVersion(python: string): Promise<readonly [number, number] | undefined> {
  const end = await run(python, ["-c", question]);
  const found = end.code === 0 ? /^(\d+)\.(\d+)\s*$/.exec(end.text) : null;
  return found ? [Number(found[1]), Number(found[2])] : undefined;
}

/** Whether a version is one that the pinned packages exist for. */
export function newEnough(version: readonly [number, number]): boolean {
  return version[0] > oldestPython[0] || (version[0] === oldestPython[0] && version[1] >= oldestPython[1]);
}

/** What was found in the search for a Python. */
export interface PythonSearch {
  /** A command that runs a Python that is new enough. */
  readonly python?: string;
  /** If there is none: what there is, in words. */
  readonly problem?: string;
}

/**
 * Looks for a Python that is new enough: the one that LAGBOOK_PYTHON names, or else `python3`, the versioned names
 * and `python` on the PATH.
 */
export async function findPython(environment: NodeJS.ProcessEnv = process.env): Promise<PythonSearch> {
  const named = environment["LAGBOOK_PYTHON"];
  const [major, minor] = oldestPython;
  const versioned = [3, 2, 1, 0].map((step) => `python${major}.${minor + step}`);
  const candidates = named ? [named] : ["python3", ...versioned, "python"];
  const old: string[] = [];
  for (const candidate of candidates) {
    const version = await pythonVersion(candidate);
    if (!version) continue;
    if (newEnough(version)) return { python: candidate };
    old.push(`${candidate} is ${version.join(".")}`);
  }
  const wanted = `Python ${major}.${minor} or later`;
  if (old.length > 0) return { problem: `${wanted} (${old.join(", ")})` };
  return { problem: named ? `${wanted} (LAGBOOK_PYTHON names ${named}, which does not run)` : wanted };
}
