import assert from "node:assert/strict";
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { after, before, test } from "node:test";
import type { Browser, Page } from "playwright-core";
import { places } from "../../kernel/install/index.js";
import type { MimeBundle } from "../../src/data/index.js";
import { chart } from "../../src/show/index.js";
import { without } from "../machine/needs.js";
import { allKinds, shown } from "../unit/show/all-kinds.js";
import { codeCells, type IsolatedLab, isolatedLab, openChromium, openNotebook, theme } from "./lab.js";
import { cutOff, faintText, unfold } from "./looks.js";

// Cards and charts of every kind, of data with hostile names, in a notebook that JupyterLab does not trust.
const skip = without("python", "chromium");
const outputs = ".jp-NotebookPanel:not(.lm-mod-hidden) .jp-OutputArea-output";
const which = [
  ["fit", "coefficients"],
  ["look", "series"],
  ["dependence", "correlogram"],
  ["dependence", "by lag"],
  ["form", "partial residuals"],
  ["stability", "cusum"],
  ["covariances", "intervals"],
  ["bandwidth-path", "path"],
] as const;
let folder: string;
let lab: IsolatedLab;
let browser: Browser;
let page: Page;
let complaints: string[];
let cards: MimeBundle[];

before(async () => {
  if (skip) return;
  const { results } = await allKinds();
  cards = await Promise.all([...results.values()].map(shown));
  const charts = await Promise.all(which.map(([kind, name]) => shown(chart(results.get(kind)!, name))));
  const parent = join(places().state, "test");
  mkdirSync(parent, { recursive: true });
  folder = mkdtempSync(join(parent, "cards-"));
  writeFileSync(join(folder, "cards.ipynb"), JSON.stringify(notebook([...cards, ...charts])));
  lab = await isolatedLab(folder);
  browser = await openChromium();
  ({ page, complaints } = await openNotebook(browser, lab, "cards.ipynb", { width: 1280, height: 1600 }));
  await page.waitForFunction(
    ([selector, n]) => document.querySelectorAll(`${selector} .vega-embed canvas`).length === n,
    [outputs, which.length] as const,
  );
});

after(async () => {
  await browser?.close();
  await lab?.close();
  if (folder) rmSync(folder, { recursive: true, force: true });
});

function notebook(bundles: readonly MimeBundle[]): object {
  return {
    nbformat: 4,
    nbformat_minor: 5,
    metadata: { kernelspec: { name: "lagbook", display_name: "Lagbook", language: "typescript" } },
    cells: bundles.map((data, i) => ({
      cell_type: "code",
      id: `cell-${i}`,
      execution_count: null,
      metadata: {},
      source: "",
      outputs: [{ output_type: "display_data", metadata: {}, data }],
    })),
  };
}

test("the notebook is not trusted, and every card is shown as HTML, every chart by Vega", {
  skip,
}, async () => {
  const mimes = await page
    .locator(outputs)
    .evaluateAll((nodes) => nodes.map((node) => (node as HTMLElement).dataset["mimeType"] ?? node.className));
  assert.equal(mimes.filter((mime) => mime === "text/html").length, cards.length);
  assert.equal(mimes.filter((mime) => mime.includes("jp-RenderedVegaLite")).length, which.length);
  assert.ok((await codeCells(page)).every((cell) => !cell.trusted));
});

test("sanitising takes nothing from a card but the width of its digits", { skip }, async () => {
  const sent = cards.map((card) => card["text/html"] as string);
  const differences = await page.evaluate(
    ([selector, texts]) => {
      // Both by way of the same parser; styles are compared as the sanitiser writes them.
      const normal = (node: Element) => {
        for (const styled of node.querySelectorAll("[style]")) {
          const declarations = styled
            .getAttribute("style")!
            .split(";")
            .map((one) => one.trim())
            .filter((one) => one !== "" && !one.startsWith("font-variant-numeric"));
          styled.setAttribute("style", declarations.join(";"));
        }
        return node.innerHTML;
      };
      const drawn = [...document.querySelectorAll(`${selector}[data-mime-type="text/html"]`)];
      return texts.flatMap((text, i) => {
        const made = document.implementation.createHTMLDocument().createElement("div");
        made.innerHTML = text;
        const [before, after] = [normal(made), normal(drawn[i]!.cloneNode(true) as Element)];
        if (before === after) return [];
        let at = 0;
        while (before[at] === after[at]) at++;
        return [`card ${i}: ${before.slice(at - 60, at + 80)} became ${after.slice(at - 60, at + 80)}`];
      });
    },
    [outputs, sent] as const,
  );
  assert.deepEqual(differences, []);
});

test("names that are HTML or formulas make nothing but text", { skip }, async () => {
  const text = (await page.locator(outputs).allInnerTexts()).join("\n");
  assert.ok(text.includes('<img src=x onerror="alert(1)">'));
  assert.ok(text.includes("$x$ and \\(y\\)"));
  assert.equal(
    await page.locator(`${outputs} mjx-container, ${outputs} [onload], ${outputs} img[src="x"]`).count(),
    0,
  );
});

test("every picture is drawn", { skip }, async () => {
  await unfold(page, outputs);
  const broken = await page.locator(`${outputs} img`).evaluateAll(async (images) => {
    const drawn = await Promise.all(
      (images as HTMLImageElement[]).map((image) =>
        image.decode().then(
          () => image.naturalWidth > 0,
          () => false,
        ),
      ),
    );
    return drawn.map((good, i) => [good, i] as const).filter(([good]) => !good);
  });
  assert.deepEqual(broken, []);
});

test("tooltips show names as text", { skip }, async () => {
  const first = page.locator(`${outputs} .vega-embed canvas`).first();
  await first.scrollIntoViewIfNeeded();
  const box = (await first.boundingBox())!;
  const tip = page.locator("#vg-tooltip-element.visible");
  let seen = "";
  for (let y = 30; y < box.height && seen === ""; y += 6) {
    for (let x = box.width * 0.3; x < box.width && seen === ""; x += 9) {
      await page.mouse.move(box.x + x, box.y + y);
      if ((await tip.count()) > 0) seen = (await tip.textContent()) ?? "";
    }
  }
  assert.match(seen, /term/, "a point has a tooltip");
  assert.match(seen, /interval/);
  assert.equal(await tip.locator("img, svg, script").count(), 0);
});

test("cards read in light, in dark and in a narrow window", { skip }, async () => {
  await unfold(page, outputs);
  assert.deepEqual(await faintText(page, outputs, 4.5), []);
  await theme(page, "JupyterLab Dark");
  assert.deepEqual(await faintText(page, outputs, 4.5), []);
  await page.setViewportSize({ width: 480, height: 1600 });
  await page.waitForTimeout(500);
  assert.deepEqual(await cutOff(page, outputs), []);
});

test("nothing untoward happened in all this", { skip }, () => {
  assert.deepEqual(complaints, []);
});
