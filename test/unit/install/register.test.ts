import assert from "node:assert/strict";
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { test } from "node:test";
import { prefixDataFolder, register, userDataFolder } from "../../../kernel/install/register.js";
import { root } from "../../root.js";

test("a registration holds a specification that Jupyter can start, and the logos", () => {
  const data = mkdtempSync(join(tmpdir(), "lagbook-"));
  try {
    const folder = register(data, root);
    assert.equal(folder, join(data, "kernels", "lagbook"));
    const specification = JSON.parse(readFileSync(join(folder, "kernel.json"), "utf8"));
    assert.deepEqual(specification.argv, [
      process.execPath,
      join(root, "dist", "kernel", "cli.js"),
      "kernel",
      "{connection_file}",
    ]);
    assert.equal(specification.interrupt_mode, "message");
    assert.equal(specification.language, "typescript");
    assert.deepEqual(readdirSync(folder).sort(), [
      "kernel.json",
      "logo-32x32.png",
      "logo-64x64.png",
      "logo-svg.svg",
    ]);
    for (const size of [32, 64]) {
      // A PNG's width and height are the two numbers at byte 16 (PNG specification, IHDR).
      const png = readFileSync(join(folder, `logo-${size}x${size}.png`));
      assert.equal(png.readUInt32BE(16), size);
      assert.equal(png.readUInt32BE(20), size);
    }
  } finally {
    rmSync(data, { recursive: true });
  }
});

test("a registration replaces an earlier one whole", () => {
  const data = mkdtempSync(join(tmpdir(), "lagbook-"));
  try {
    const folder = register(data, root);
    writeFileSync(join(folder, "stale.txt"), "");
    register(data, root);
    assert.ok(!readdirSync(folder).includes("stale.txt"));
  } finally {
    rmSync(data, { recursive: true });
  }
});

test("data folders follow Jupyter's documented rules", () => {
  assert.equal(userDataFolder({}, "linux", "/home/u"), "/home/u/.local/share/jupyter");
  assert.equal(userDataFolder({ XDG_DATA_HOME: "/d" }, "linux", "/home/u"), "/d/jupyter");
  assert.equal(userDataFolder({}, "darwin", "/Users/u"), "/Users/u/Library/Jupyter");
  assert.equal(userDataFolder({ JUPYTER_DATA_DIR: "/j" }, "darwin", "/Users/u"), "/j");
  assert.equal(prefixDataFolder("/opt/env"), "/opt/env/share/jupyter");
});
