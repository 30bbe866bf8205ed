import assert from "node:assert/strict";
import { readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { after, before, test } from "node:test";
import type { Browser } from "playwright-core";
import { without } from "../machine/needs.js";
import { fixturePath } from "../root.js";
import {
  codeCells,
  type IsolatedLab,
  isolatedLab,
  openChromium,
  openNotebook,
  runAll,
  save,
  theme,
} from "./lab.js";
import { faintText, unfold } from "./looks.js";

const skip = without("python", "chromium");
const outputs = ".jp-NotebookPanel:not(.lm-mod-hidden) .jp-OutputArea-output";
let lab: IsolatedLab;
let browser: Browser;

before(async () => {
  if (skip) return;
  lab = await isolatedLab(fixturePath("browser/fixtures"));
  browser = await openChromium();
});

after(async () => {
  await browser?.close();
  await lab?.close();
});

test("a notebook that is opened again untrusted still shows its cards", { skip }, async () => {
  const first = await openNotebook(browser, lab, "small.ipynb");
  await runAll(first.page);
  const before = await first.page.locator(outputs).allInnerTexts();
  await save(first.page);
  await first.page.close();

  // Jupyter trusts what it saved itself by a signature of the content; another content has none.
  const notebook = JSON.parse(readFileSync(join(lab.notebooks, "small.ipynb"), "utf8"));
  notebook.cells.push({ cell_type: "markdown", id: "added", metadata: {}, source: ["added outside"] });
  writeFileSync(join(lab.notebooks, "foreign.ipynb"), JSON.stringify(notebook));

  const { page, complaints } = await openNotebook(browser, lab, "foreign.ipynb");
  const cells = await codeCells(page);
  assert.ok(cells.length > 5);
  assert.ok(
    cells.every((cell) => !cell.trusted),
    "the notebook is not trusted",
  );
  const cards = page.locator(`${outputs}.jp-RenderedHTML`);
  const held = cells
    .flatMap((cell) => cell.outputs)
    .filter((output) => output.data && "text/html" in output.data);
  assert.ok(held.length >= 4, "the notebook holds cards");
  assert.equal(await cards.count(), held.length, "every card is shown as HTML");
  const after = await page.locator(outputs).allInnerTexts();
  assert.deepEqual(after, before, "and says what it said when it was trusted");
  await unfold(page, outputs);
  assert.deepEqual(await faintText(page, outputs, 4.5), []);
  await theme(page, "JupyterLab Dark");
  assert.deepEqual(await faintText(page, outputs, 4.5), []);
  assert.deepEqual(complaints, []);
  await page.close();
});

test("a column name that is HTML stays a name everywhere", { skip }, async () => {
  const { page, complaints } = await openNotebook(browser, lab, "hostile.ipynb");
  await runAll(page);
  const cells = await codeCells(page);
  for (const cell of cells) {
    const error = cell.outputs.find((output) => output.output_type === "error");
    assert.equal(error, undefined, `${error?.evalue} in ${cell.source}`);
  }
  const name = "<img src=x onerror=alert(1)>";
  assert.ok((await page.locator(outputs).allInnerTexts()).join("\n").includes(name), "the name is shown");
  assert.equal(await page.locator('img[src="x"], [onerror]').count(), 0, "and makes no element");
  assert.deepEqual(complaints, [], "and no dialog, failed request or error");
  await page.close();
});
