import assert from "node:assert/strict";
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { after, before, test } from "node:test";
import { pathToFileURL } from "node:url";
import type { Browser } from "playwright-core";
import { run } from "../../kernel/install/command.js";
import { places } from "../../kernel/install/index.js";
import { without } from "../machine/needs.js";
import { fixturePath, root } from "../root.js";
import { demoNotebooks, newPage, openChromium } from "./lab.js";
import { cutOff, faintText, pixels, unfold } from "./looks.js";

const skip = without("chromium");
const pictures = join(places().state, "screenshots");
const cli = join(root, "dist", "kernel", "cli.js");
let browser: Browser;
let scratch: string;

before(async () => {
  if (skip) return;
  mkdirSync(pictures, { recursive: true });
  mkdirSync(join(places().state, "test"), { recursive: true });
  scratch = mkdtempSync(join(places().state, "test", "page-"));
  browser = await openChromium();
});

after(async () => {
  await browser?.close();
  if (scratch) rmSync(scratch, { recursive: true });
});

const sources: [string, string][] = [
  ...demoNotebooks().map((name): [string, string] => [name, join(root, "notebooks-demo", name)]),
  ["small.ipynb", fixturePath("browser/fixtures/small.ipynb")],
  ["hostile.ipynb", fixturePath("browser/fixtures/hostile.ipynb")],
];

for (const [name, path] of sources) {
  test(`the page of ${name} stands by itself and reads well`, { skip }, async () => {
    const file = join(scratch, name.replace(/ipynb$/, "html"));
    const end = await run(process.execPath, [cli, "run", path, "--html", file]);
    assert.equal(end.code, 0, end.text);

    const page = await newPage(browser, { viewport: { width: 1000, height: 2400 }, colorScheme: "light" });
    const requests: string[] = [];
    const complaints: string[] = [];
    page.on("request", (request) => requests.push(request.url()));
    page.on("console", (message) => complaints.push(message.text()));
    page.on("dialog", (dialog) => {
      complaints.push(`dialog ${dialog.message()}`);
      void dialog.dismiss();
    });
    const address = pathToFileURL(file).href;
    await page.goto(address);
    const stem = `page-${name.replace(/\.ipynb$/, "")}`;
    const shot = async (kind: string) => {
      const png = await page.screenshot({ fullPage: kind !== "print" });
      writeFileSync(join(pictures, `${stem}-${kind}.png`), png);
      return pixels(browser, png);
    };
    assert.ok((await shot("light")).luminance > 0.8);
    await unfold(page, "main");
    assert.deepEqual(await faintText(page, "main", 4.5), [], "text is easy to read in light");
    await page.emulateMedia({ colorScheme: "dark" });
    assert.ok((await shot("dark")).luminance < 0.35);
    assert.deepEqual(await faintText(page, "main", 4.5), [], "text is easy to read in dark");
    await page.emulateMedia({ colorScheme: "dark", media: "print" });
    assert.ok((await shot("print")).luminance > 0.8, "paper is white, whatever the screen was");
    assert.deepEqual(await faintText(page, "main", 4.5), [], "text is easy to read on paper");
    await page.emulateMedia({ colorScheme: "light", media: "screen" });
    await page.setViewportSize({ width: 420, height: 1600 });
    await shot("narrow");
    assert.deepEqual(await cutOff(page, "main"), [], "a narrow window cuts nothing off");
    const sideways = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    assert.ok(sideways <= 0, `the page as a whole scrolls sideways by ${sideways}`);

    const broken = await page
      .locator("img")
      .evaluateAll((images) =>
        (images as HTMLImageElement[])
          .filter((image) => image.naturalWidth === 0)
          .map((image) => image.src.slice(0, 60)),
      );
    assert.deepEqual(broken, []);
    assert.equal(await page.locator("script, link, iframe, [onerror], img[src='x']").count(), 0);
    assert.deepEqual(
      requests.filter((url) => url !== address && !url.startsWith("data:")),
      [],
      "nothing is loaded",
    );
    assert.deepEqual(complaints, []);
    await page.close();
  });
}
