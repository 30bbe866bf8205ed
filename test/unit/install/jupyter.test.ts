import assert from "node:assert/strict";
import { existsSync, mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join, sep } from "node:path";
import { test } from "node:test";
import { labArguments, prepareHome } from "../../../kernel/install/jupyter.js";
import { canOpenBrowser } from "../../../kernel/install/opener.js";

test("a prepared home keeps every folder that Jupyter writes to inside it", () => {
  const home = mkdtempSync(join(tmpdir(), "lagbook-"));
  try {
    const inner = prepareHome(home, { PATH: "/bin", JUPYTER_PATH: "/outer" });
    for (const name of [
      ...["JUPYTER_CONFIG_DIR", "JUPYTER_DATA_DIR", "JUPYTER_RUNTIME_DIR", "JUPYTERLAB_SETTINGS_DIR"],
      ...["JUPYTERLAB_WORKSPACES_DIR", "IPYTHONDIR"],
    ]) {
      assert.ok(inner[name]?.startsWith(home + sep), `${name} is ${inner[name]}`);
    }
    assert.equal(inner["JUPYTER_PATH"], `${join(home, "data")}:/outer`);
    assert.equal(inner["PATH"], "/bin");
    assert.ok(existsSync(join(home, "data", "kernels", "lagbook", "kernel.json")));
  } finally {
    rmSync(home, { recursive: true });
  }
});

test("JupyterLab is told the folder, the port as asked, and root's permission only as root", () => {
  const common = { notebooks: "/n", browser: false };
  assert.deepEqual(labArguments({ ...common, port: 9123 }, 1000).slice(3), [
    "--MultiKernelManager.default_kernel_name=lagbook",
    "--port=9123",
    "--ServerApp.port_retries=0",
    "--no-browser",
  ]);
  assert.ok(labArguments(common, 0).includes("--allow-root"));
  assert.ok(!labArguments(common, 1000).includes("--allow-root"));
  assert.ok(!labArguments({ ...common, browser: true }, 1000).includes("--no-browser"));
  assert.ok(
    labArguments({ ...common, first: "two words/é.ipynb" }, 1000).includes(
      "--LabApp.default_url=/lab/tree/two%20words/%C3%A9.ipynb",
    ),
  );
});

test("a browser opens only where there is a display and something to open it", () => {
  const linux = (environment: NodeJS.ProcessEnv) => canOpenBrowser(environment, "linux");
  assert.equal(linux({ DISPLAY: ":0", BROWSER: "firefox" }), true);
  assert.equal(linux({ DISPLAY: ":0", BROWSER: "firefox", CI: "true" }), false);
  assert.equal(linux({ BROWSER: "firefox" }), false);
  assert.equal(linux({ DISPLAY: ":0", PATH: "/nowhere" }), false);
  assert.equal(canOpenBrowser({}, "darwin"), true);
});
