import assert from "node:assert/strict";
import { spawnSync } from "node:child_process";
import { mkdirSync, mkdtempSync } from "node:fs";
import { join } from "node:path";
import { test } from "node:test";
import { register } from "../../kernel/install/index.js";
import { python, without } from "../machine/needs.js";
import { fixturePath, root } from "../root.js";

test("the public conformance suite passes", { skip: without("python") }, () => {
  mkdirSync(join(root, ".lagbook"), { recursive: true });
  const data = mkdtempSync(join(root, ".lagbook", "conformance-"));
  register(data);
  const run = spawnSync(python, [fixturePath("conformance/suite.py")], {
    env: {
      ...process.env,
      JUPYTER_PATH: data,
      JUPYTER_RUNTIME_DIR: join(data, "runtime"),
      JUPYTER_DATA_DIR: data,
    },
    encoding: "utf8",
    timeout: 240_000,
  });
  assert.equal(run.status, 0, run.stderr);
  // unittest's closing line; the one skipped test asks for a pager, which notebooks do not have.
  assert.match(run.stderr, /Ran 12 tests/);
  assert.match(run.stderr, /OK \(skipped=1\)/);
});
