import assert from "node:assert/strict";
import { mkdirSync, readdirSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { after, before, test } from "node:test";
import type { Browser, Page } from "playwright-core";
import { places } from "../../kernel/install/index.js";
import { without } from "../machine/needs.js";
import { root } from "../root.js";
import {
  codeCells,
  demoNotebooks,
  type IsolatedLab,
  isolatedLab,
  openChromium,
  openNotebook,
  runAll,
  save,
  theme,
} from "./lab.js";
import { cutOff, faintText, pixels, unfold } from "./looks.js";

const skip = without("python", "chromium");
const outputs = ".jp-NotebookPanel:not(.lm-mod-hidden) .jp-OutputArea-output";
const pictures = join(places().state, "screenshots");
let lab: IsolatedLab;
let browser: Browser;
let chartsSeen = 0;

before(async () => {
  if (skip) return;
  mkdirSync(pictures, { recursive: true });
  lab = await isolatedLab(join(root, "notebooks-demo"));
  browser = await openChromium();
});

after(async () => {
  await browser?.close();
  await lab?.close();
});

/** Charts that the outputs hold, and charts that are drawn. */
async function charts(page: Page): Promise<{ held: number; drawn: number }> {
  const cells = await codeCells(page);
  const held = cells
    .flatMap((cell) => cell.outputs)
    .filter((output) =>
      Object.keys(output.data ?? {}).some((mime) => mime.startsWith("application/vnd.vega")),
    );
  const drawn = await page
    .locator(`${outputs} .vega-embed canvas, ${outputs} .vega-embed .chart-wrapper > svg`)
    .count();
  return { held: held.length, drawn };
}

async function brokenPictures(page: Page): Promise<string[]> {
  return page
    .locator(`${outputs} img`)
    .evaluateAll((images) =>
      (images as HTMLImageElement[])
        .filter((image) => !image.complete || image.naturalWidth === 0)
        .map((image) => image.src.slice(0, 80)),
    );
}

for (const name of demoNotebooks()) {
  test(`${name} runs in JupyterLab and reads well, light, dark and narrow`, { skip }, async () => {
    const { page, complaints } = await openNotebook(browser, lab, name, { width: 1280, height: 2400 });
    await runAll(page);
    const stem = name.replace(/\.ipynb$/, "");
    const shot = async (kind: string) => {
      const png = await page.screenshot();
      writeFileSync(join(pictures, `${stem}-${kind}.png`), png);
      return pixels(browser, png);
    };

    for (const cell of await codeCells(page)) {
      assert.ok(cell.outputs.length > 0, `a cell has no output:\n${cell.source}`);
      const error = cell.outputs.find((output) => output.output_type === "error");
      assert.equal(error, undefined, `${error?.ename}: ${error?.evalue}\nin\n${cell.source}`);
    }
    const { held, drawn } = await charts(page);
    assert.equal(drawn, held, "every chart is drawn");
    chartsSeen += drawn;
    assert.deepEqual(await brokenPictures(page), []);

    const light = await shot("light");
    assert.ok(light.luminance > 0.75, `light, yet of luminance ${light.luminance}`);
    assert.ok(light.colours > 30, `${light.colours} colours`);
    await unfold(page, outputs);
    assert.deepEqual(await faintText(page, outputs, 4.5), [], "text is easy to read in light");
    await theme(page, "JupyterLab Dark");
    const dark = await shot("dark");
    assert.ok(dark.luminance < 0.35, `dark, yet of luminance ${dark.luminance}`);
    assert.ok(dark.colours > 30, `${dark.colours} colours`);
    assert.deepEqual(await faintText(page, outputs, 4.5), [], "text is easy to read in dark");
    await theme(page, "JupyterLab Light");

    await page.setViewportSize({ width: 640, height: 1600 });
    await page.waitForTimeout(500);
    await shot("narrow");
    assert.deepEqual(await cutOff(page, outputs), [], "a narrow window cuts nothing off");

    await save(page);
    assert.deepEqual(complaints, []);
    await page.close();
  });
}

test("the demo notebooks show charts", { skip }, () => {
  assert.ok(chartsSeen > 0);
});

test("nothing was written into the user's home", { skip }, () => {
  // Chromium is ours, not the server's; what is looked at is what the server and the kernels were given as home.
  assert.deepEqual(readdirSync(lab.home), []);
});
