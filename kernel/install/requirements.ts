import { existsSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { run } from "./command.js";
import { packageRoot } from "./places.js";

/** Which set of pinned packages: what JupyterLab needs, or that and what the tests need. */
export type RequirementSet = "jupyterlab" | "tests";

/** The requirements file of a set. */
export function requirementsFile(set: RequirementSet, root: string = packageRoot): string {
  return join(root, "kernel", "install", set === "tests" ? "requirements-test.txt" : "requirements.txt");
}

/** The pins of a requirements file, following its `-r` lines: package name and version. */
export function pins(file: string): readonly (readonly [string, string])[] {
  const found: (readonly [string, string])[] = [];
  for (const raw of readFileSync(file, "utf8").split("\n")) {
    const line = raw.replace(/#.*/, "").trim();
    if (line === "") continue;
    const other = /^-r\s+(.+)$/.exec(line);
    const pin = /^([\w.-]+)==([\w.!+-]+)$/.exec(line);
    if (other) found.push(...pins(join(dirname(file), other[1]!)));
    else if (pin) found.push([pin[1]!, pin[2]!]);
    else throw new Error(`${file}: "${line}" is not a pin (name==version) and not -r file`);
  }
  return found;
}

const program = `
import importlib.metadata, json, sys
wrong = []
for name, version in json.loads(sys.argv[1]):
    try:
        present = importlib.metadata.version(name)
    except importlib.metadata.PackageNotFoundError:
        present = None
    if present != version:
        wrong.append(f"{name} {present or 'absent'}, wanted {version}")
print(json.dumps(wrong))
`;

/**
 * Compares an interpreter's packages with a requirements file.
 *
 * @returns one line per package that is absent or of another version; undefined if the interpreter does not run
 */
export async function missingPackages(python: string, file: string): Promise<readonly string[] | undefined> {
  if (!existsSync(python)) return undefined;
  const end = await run(python, ["-c", program, JSON.stringify(pins(file))]);
  if (end.code !== 0) return undefined;
  return JSON.parse(end.text) as string[];
}
