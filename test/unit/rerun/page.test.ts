import assert from "node:assert/strict";
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { test } from "node:test";
import type { Cell, CellOutput, Notebook } from "../../../kernel/rerun/notebook.js";
import { notebookToPage } from "../../../kernel/rerun/page/page.js";

const page = (cells: Cell[], extra: Partial<Parameters<typeof notebookToPage>[1]> = {}) =>
  notebookToPage({ nbformat: 4, nbformat_minor: 5, metadata: {}, cells } as Notebook, {
    name: "n.ipynb",
    maker: "Lagbook 0",
    ...extra,
  });
const markdown = (source: string, more: Partial<Cell> = {}): Cell => ({
  cell_type: "markdown",
  source,
  metadata: {},
  ...more,
});
const code = (source: string, ...outputs: CellOutput[]): Cell => ({
  cell_type: "code",
  source,
  metadata: {},
  execution_count: 3,
  outputs,
});
const result = (data: Record<string, unknown>): CellOutput => ({
  output_type: "display_data",
  data,
  metadata: {},
});

test("markdown is drawn, its HTML and its script addresses are not", () => {
  const html = page([
    markdown(
      "# Ferries & *fares*\n\n| a | b |\n|---|---|\n| 1 | 2 |\n\n<img src=x onerror=alert(1)>\n\n[x](javascript:alert(1))",
    ),
  ]);
  assert.match(html, /<title>Ferries &amp; fares<\/title>/);
  assert.match(html, /<td>1<\/td>/);
  assert.match(html, /&lt;img src=x onerror=alert\(1\)&gt;/);
  assert.doesNotMatch(html, /<img src=x|href="javascript:/);
});

test("the page allows no script and loads nothing", () => {
  const html = page([markdown("![far](https://example.org/a.png)")]);
  assert.match(
    html,
    /Content-Security-Policy" content="default-src 'none'; style-src 'unsafe-inline'; img-src data:/,
  );
  assert.match(html, /<a href="https:\/\/example\.org\/a\.png">far<\/a>/);
  assert.doesNotMatch(html, /<img|<script|<link|@import/);
});

test("mathematics becomes MathML; money stays money", () => {
  const html = page([
    markdown("With $y_t = x_t'\\beta$ and\n\n$$\\hat\\Omega$$\n\nit costs $5 or $6, `$a$`."),
  ]);
  assert.equal(html.match(/<math /g)?.length, 2);
  assert.match(html, /display="block"/);
  assert.match(html, /it costs \$5 or \$6, <code>\$a\$<\/code>/);
});

test("pictures beside the notebook and attachments come along; files outside its folder don't", () => {
  const folder = mkdtempSync(join(tmpdir(), "lagbook-"));
  try {
    mkdirSync(join(folder, "book"));
    writeFileSync(join(folder, "outside.png"), "secret");
    writeFileSync(join(folder, "book", "my map.png"), "map");
    const cell = markdown(
      "![a](my%20map.png) ![b](attachment:p.png) ![c](../outside.png) ![d](absent.png) ![e](data:image/png;base64,AAAA)",
      { attachments: { "p.png": { "image/png": "QUJD" } } },
    );
    const html = page([cell], { folder: join(folder, "book") });
    const inlined = [...html.matchAll(/<img src="([^"]*)" alt="(\w)">/g)].map(([, source, alt]) => [
      alt,
      source,
    ]);
    assert.deepEqual(inlined, [
      ["a", `data:image/png;base64,${Buffer.from("map").toString("base64")}`],
      ["b", "data:image/png;base64,QUJD"],
      ["e", "data:image/png;base64,AAAA"],
    ]);
    assert.match(html, /<a href="\.\.\/outside\.png">c<\/a>/);
  } finally {
    rmSync(folder, { recursive: true });
  }
});

test("code is escaped and its words are marked", () => {
  const html = page([code('const a: string = "<b>" // note')]);
  assert.match(html, /<span class="hljs-keyword">const<\/span>/);
  assert.match(html, /<span class="hljs-string">&quot;&lt;b&gt;&quot;<\/span>/);
  assert.match(html, /<summary>\[3\]<\/summary>/);
});

test("of a bundle the richest form that a still page can show is taken", () => {
  const svg = "<svg xmlns='http://www.w3.org/2000/svg'/>";
  const base64 = Buffer.from(svg).toString("base64");
  const all = {
    "text/html": ["<table>", "<td>card</td></table>"],
    "image/svg+xml": svg,
    "image/png": "QUJD\n",
    "application/vnd.vegalite.v6+json": { mark: "line" },
    "text/plain": "plain <&",
  };
  const shown = (data: Record<string, unknown>) => page([code("x", result(data))]);
  assert.match(shown(all), /<table><td>card<\/td><\/table>/);
  const { "text/html": _html, ...noHtml } = all;
  assert.ok(shown(noHtml).includes(`<img src="data:image/svg+xml;base64,${base64}" alt="plain &lt;&amp;">`));
  const { "image/svg+xml": _svg, ...noSvg } = noHtml;
  assert.ok(shown(noSvg).includes('<img src="data:image/png;base64,QUJD"'));
  assert.match(shown({ "text/plain": "plain <&" }), /<pre>plain &lt;&amp;<\/pre>/);
  assert.match(shown({ "text/markdown": "*soft* <i>" }), /<em>soft<\/em> &lt;i&gt;/);
  assert.match(shown({ "text/latex": "$$\\alpha$$" }), /<math /);
  assert.match(shown({ "application/json": { a: "<" } }), /&quot;a&quot;: &quot;&lt;&quot;/);
  assert.match(shown({ "application/x-odd<": 1 }), /can't show: application\/x-odd&lt;/);
});

test("a picture whose base64 is none cannot break out of its attribute", () => {
  const html = page([code("x", result({ "image/png": '"><script>alert(1)</script>', "text/plain": "p" }))]);
  assert.doesNotMatch(html, /<script/);
  assert.match(html, /<pre>p<\/pre>/);
});

test("streams and tracebacks keep colours and lose control codes; a progress line shows its last state", () => {
  const html = page([
    code(
      "x",
      { output_type: "stream", name: "stderr", text: "10 %\r50 %\r100 %\n<ok>\u001b[2K\n" },
      {
        output_type: "error",
        ename: "E",
        evalue: "v",
        traceback: ["\u001b[1;31mE\u001b[0m: <v>", "\u001b[38;5;9mx\u001b[39m"],
      },
    ),
  ]);
  assert.match(html, /<pre class="stream stderr">100 %\n&lt;ok&gt;\n<\/pre>/);
  assert.match(html, /<span class="ansi-red ansi-bold">E<\/span>: &lt;v&gt;\nx<\/pre>/);
  assert.ok(!html.includes("\u001b"));
});

test("a run that stopped says where, why and how much is left", () => {
  const html = page([code("x")], { failure: { cell: 4, execution: 3, message: "E: <v>.", left: 2 } });
  assert.match(html, /stopped at cell 4<\/strong> \[3\]: E: &lt;v&gt;\. 2 code cells after it did not run/);
});
