import assert from "node:assert/strict";
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { test } from "node:test";
import { drawSvg } from "../../../../src/show/chart/draw.js";
import { seriesEncoding } from "../../../../src/show/chart/series.js";
import { dressed } from "../../../../src/show/chart/spec.js";
import { root } from "../../../root.js";
import { hostile } from "../hostile.js";
import { svgFaults } from "../markup.js";

const body = {
  title: { text: hostile[0] },
  data: { values: hostile.map((name, i) => ({ x: i, y: i * i, s: name })) },
  mark: "point",
  encoding: {
    x: { field: "x", type: "quantitative" },
    y: { field: "y", type: "quantitative" },
    ...seriesEncoding("s", hostile).point,
  },
};
const source = { title: hostile[1], description: hostile[2], body };

test("names in headings and legends are drawn as text", async () => {
  const svg = await drawSvg(dressed(source));
  assert.deepEqual(svgFaults(svg), []);
  assert.match(svg, /&lt;img src=x onerror=/);
  assert.match(svg, /&lt;script&gt;alert\(2\)/);
});

test("the same chart gives the same bytes, one after the other and at once", async () => {
  const first = await drawSvg(dressed(source));
  const others = await Promise.all([drawSvg(dressed(source)), drawSvg(dressed(source))]);
  for (const svg of others) assert.equal(svg, first);
});

test("a picture has no ground of its own and no colour for one theme only", async () => {
  const svg = await drawSvg(dressed(source));
  assert.doesNotMatch(svg, /fill="(?:#fff(?:fff)?|white|#000(?:000)?|black)"/i);
});

test("a chart loads nothing", async () => {
  const points = (data: object) =>
    drawSvg(dressed({ ...source, body: { data, mark: "point", encoding: { x: body.encoding.x } } }));
  const circles = (svg: string) => svg.match(/<path (?=[^>]*stroke-width="2")/g)?.length ?? 0;
  assert.equal(circles(await points(body.data)), hostile.length);
  assert.equal(circles(await points({ url: `file://${join(root, "package.json")}` })), 0);
});

test("Vega is loaded by the first chart, not by the room's door", () => {
  const folder = join(root, "src/show");
  for (const file of readdirSync(folder, { recursive: true, encoding: "utf8" })) {
    if (!file.endsWith(".ts")) continue;
    const text = readFileSync(join(folder, file), "utf8");
    assert.doesNotMatch(text, /^import (?!type)[^;]*from "vega/m, file);
  }
});
