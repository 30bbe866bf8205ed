import assert from "node:assert/strict";
import { chmodSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { test } from "node:test";
import { ensureEnvironment, SetUpError } from "../../../kernel/install/environment.js";
import { places } from "../../../kernel/install/places.js";
import { findPython, newEnough, pythonVersion } from "../../../kernel/install/python.js";
import { missingPackages, pins, requirementsFile } from "../../../kernel/install/requirements.js";
import { python, without } from "../../machine/needs.js";
import { root } from "../../root.js";

function inFolder(act: (folder: string) => Promise<void>): Promise<void> {
  const folder = mkdtempSync(join(tmpdir(), "lagbook-"));
  return act(folder).finally(() => rmSync(folder, { recursive: true }));
}

/** A command that answers like a Python of some version. */
function pretender(folder: string, version: string): string {
  const path = join(folder, `python-${version}`);
  writeFileSync(path, `#!/bin/sh\necho ${version}\n`);
  chmodSync(path, 0o755);
  return path;
}

test("every requirement is pinned, and the tests' set contains JupyterLab's", () => {
  const lab = pins(requirementsFile("jupyterlab", root));
  const tests = pins(requirementsFile("tests", root));
  assert.ok(lab.some(([name]) => name === "jupyterlab"));
  assert.deepEqual(tests.slice(0, lab.length), lab);
  assert.ok(tests.some(([name]) => name === "jupyter_kernel_test"));
});

test("a requirement that is no pin is refused", () =>
  inFolder(async (folder) => {
    const file = join(folder, "r.txt");
    writeFileSync(file, "numpy>=2\n");
    assert.throws(() => pins(file), /"numpy>=2" is not a pin/);
  }));

test("the search for a Python passes over what does not run and what is too old", () =>
  inFolder(async (folder) => {
    assert.equal(newEnough([3, 11]), true);
    assert.equal(newEnough([3, 10]), false);
    assert.equal(newEnough([4, 0]), true);
    assert.deepEqual(await pythonVersion(pretender(folder, "3.9")), [3, 9]);
    assert.equal(await pythonVersion(join(folder, "absent")), undefined);
    const named = (path: string) => findPython({ LAGBOOK_PYTHON: path });
    assert.deepEqual(await named(pretender(folder, "3.12")), { python: join(folder, "python-3.12") });
    assert.match(
      (await named(pretender(folder, "3.9"))).problem!,
      /Python 3\.11 or later \(.*python-3\.9 is 3\.9\)/,
    );
    assert.match((await named(join(folder, "absent"))).problem!, /does not run/);
  }));

test("with no Python, set-up says what is missing and makes nothing", () =>
  inFolder(async (folder) => {
    const before = process.env["LAGBOOK_PYTHON"];
    process.env["LAGBOOK_PYTHON"] = join(folder, "absent");
    mkdirSync(join(folder, "kernel", "install"), { recursive: true });
    writeFileSync(join(folder, "kernel", "install", "requirements.txt"), "jupyterlab==4.6.6\n");
    try {
      await assert.rejects(
        ensureEnvironment(places(folder), "jupyterlab", () => {}),
        (problem) => problem instanceof SetUpError && /Python 3\.11 or later/.test(problem.message),
      );
    } finally {
      if (before === undefined) delete process.env["LAGBOOK_PYTHON"];
      else process.env["LAGBOOK_PYTHON"] = before;
    }
  }));

test("an environment is compared with the pins", { skip: without("python") }, () =>
  inFolder(async (folder) => {
    assert.deepEqual(await missingPackages(python, requirementsFile("tests", root)), []);
    const file = join(folder, "r.txt");
    writeFileSync(file, "numpy==0.0.1\nno-such-package==1.0\n");
    const missing = await missingPackages(python, file);
    assert.match(missing![0]!, /^numpy [\d.]+, wanted 0\.0\.1$/);
    assert.equal(missing![1], "no-such-package absent, wanted 1.0");
    assert.equal(await missingPackages(join(folder, "absent"), file), undefined);
  }),
);
