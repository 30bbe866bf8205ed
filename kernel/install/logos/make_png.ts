// Draws logo-32x32.png and logo-64x64.png from logo-svg.svg: npx tsx kernel/install/logos/make_png.ts
import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { chromium } from "playwright-core";

const beside = (name: string) => fileURLToPath(new URL(name, import.meta.url));
const drawing = readFileSync(beside("logo-svg.svg"), "utf8");
const browser = await chromium.launch({
  executablePath: process.env["LAGBOOK_CHROMIUM"] ?? "/usr/bin/chromium",
  args: ["--no-sandbox", "--headless", "--disable-gpu"],
});
for (const size of [32, 64]) {
  const page = await browser.newPage({ viewport: { width: size, height: size } });
  const scaled = drawing.replace('width="64" height="64">', `width="${size}" height="${size}">`);
  await page.setContent(`<style>body{margin:0}svg{display:block}</style>${scaled}`);
  await page.screenshot({ path: beside(`logo-${size}x${size}.png`), omitBackground: true });
}
await browser.close();
