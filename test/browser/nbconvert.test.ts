import assert from "node:assert/strict";
import { cpSync, mkdirSync, mkdtempSync, readFileSync, rmSync } from "node:fs";
import { join } from "node:path";
import { test } from "node:test";
import { run } from "../../kernel/install/command.js";
import { places, prepareHome } from "../../kernel/install/index.js";
import { python, without } from "../machine/needs.js";
import { root } from "../root.js";
import { demoNotebooks } from "./lab.js";

for (const name of demoNotebooks().slice(0, 1)) {
  test(`nbconvert executes ${name} and writes it as HTML`, { skip: without("python") }, async () => {
    const parent = join(places().state, "test");
    mkdirSync(parent, { recursive: true });
    const scratch = mkdtempSync(join(parent, "nbconvert-"));
    try {
      const notebooks = join(scratch, "notebooks");
      cpSync(join(root, "notebooks-demo"), notebooks, { recursive: true });
      const env = prepareHome(join(scratch, "jupyter"), { ...process.env, HOME: scratch });
      const args = [
        "-m",
        "nbconvert",
        "--to",
        "html",
        "--execute",
        "--ExecutePreprocessor.timeout=300",
        name,
      ];
      const end = await run(python, args, { cwd: notebooks, env });
      assert.equal(end.code, 0, end.text.slice(-3000));
      const html = readFileSync(join(notebooks, name.replace(/\.ipynb$/, ".html")), "utf8");
      const { cells } = JSON.parse(readFileSync(join(notebooks, name), "utf8")) as {
        cells: { cell_type: string; source: string[] }[];
      };
      const codeCells = cells.filter(
        (cell) => cell.cell_type === "code" && cell.source.join("").trim() !== "",
      );
      const areas = html.match(/class="jp-OutputArea jp-Cell-outputArea"/g) ?? [];
      assert.equal(areas.length, codeCells.length, "every code cell has its output");
      // A cell that fails would have ended nbconvert with an error; what is left to see is how the outputs come out.
      const cards = html.match(/data-mime-type="text\/html"/g) ?? [];
      assert.ok(cards.length > 0, "cards are shown as HTML");
    } finally {
      rmSync(scratch, { recursive: true, force: true });
    }
  });
}

test("there are demo notebooks", () => {
  assert.ok(demoNotebooks().length > 0);
});
