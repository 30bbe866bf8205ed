import assert from "node:assert/strict";
import { before, test } from "node:test";
import type { Result } from "../../../../src/data/index.js";
import { chart, recordType, tableOf, vegaLiteType } from "../../../../src/show/index.js";
import { type AllKinds, allKinds, shown } from "../all-kinds.js";
import { hostile } from "../hostile.js";
import { outcome } from "../hostile-table.js";
import { faults, picturesIn, shownText, svgFaults } from "../markup.js";

let all: AllKinds;
before(async () => {
  all = await allKinds();
});

const charts: Readonly<Record<string, readonly string[]>> = {
  "time-table": ["series"],
  fit: ["coefficients", "residuals", "fitted"],
  look: ["series"],
  dependence: ["correlogram", "by lag", "periodogram"],
  spread: ["size"],
  form: ["quantiles", "partial residuals"],
  leverage: ["Cook's distance"],
  stability: ["breaks", "cusum", "recursive"],
  cointegration: ["distance"],
  covariances: ["intervals"],
  "bandwidth-path": ["path"],
};

test("every kind gives a card that an untrusted notebook shows whole, with names as text", async () => {
  assert.equal(all.results.size, 15);
  for (const [kind, result] of all.results) {
    const bundle = await shown(result);
    assert.deepEqual(Object.keys(bundle), ["text/plain", "text/html", recordType], kind);
    const markup = bundle["text/html"] as string;
    assert.deepEqual(faults(markup), [], kind);
    assert.match(markup, /^<div class="lagbook mathjax_ignore tex2jax_ignore"/, kind);
    assert.ok(
      [outcome, ...hostile].some((name) => shownText(markup).includes(name)),
      `${kind} names a column`,
    );
    for (const svg of picturesIn(markup)) assert.deepEqual(svgFaults(svg), [], kind);
  }
});

test("plain text holds nothing that a terminal would obey, and no name breaks a line", async () => {
  for (const [kind, result] of all.results) {
    const plain = (await shown(result))["text/plain"] as string;
    assert.doesNotMatch(plain, /[^\P{Cc}\n]|\u202e/u, kind);
    assert.doesNotMatch(plain, /line\n+break/, kind);
    assert.doesNotMatch(plain, /undefined|NaN|\[object/, kind);
  }
});

test("records survive JSON unchanged and say what made them", async () => {
  for (const [kind, result] of all.results) {
    const record = (await shown(result))[recordType] as Record<string, unknown>;
    assert.deepEqual(JSON.parse(JSON.stringify(record)), record, kind);
    assert.equal(record["lagbook"], 1);
    assert.equal(record["kind"], kind);
    if (!["integration", "cointegration"].includes(kind))
      assert.match(String(record["fingerprint"]), /^[0-9a-f]{64}$/, kind);
    assert.deepEqual(record["versions"], { node: process.versions.node, lagbook: "0.1.0" });
  }
});

test("every chart is drawn, with names as text and in no expression", async () => {
  for (const [kind, names] of Object.entries(charts)) {
    for (const which of names) {
      const made = chart(all.results.get(kind)!, which);
      const bundle = await shown(made);
      assert.deepEqual(
        Object.keys(bundle),
        ["text/plain", vegaLiteType, "image/svg+xml", recordType],
        `${kind} ${which}`,
      );
      assert.deepEqual(svgFaults(bundle["image/svg+xml"] as string), [], `${kind} ${which}`);
      assert.match(bundle["image/svg+xml"] as string, /class="mark-(?:symbol|line|rule)/, `${kind} ${which}`);
      assert.deepEqual(JSON.parse(JSON.stringify(made.spec)), made.spec, `${kind} ${which}`);
      assert.deepEqual(unsafe(made.spec), [], `${kind} ${which}`);
    }
  }
});

// Vega-Lite turns field names, tests and titles of axes and tooltips into expressions. What it takes as text: values of the
// data, headings, the description and the names of a scale's domain.
function unsafe(value: unknown, path = ""): string[] {
  if (/\.data\.values$|\.title\.text$|^\.description$|\.scale\.domain$/.test(path)) return [];
  if (typeof value === "string") return safe(path, value) ? [] : [`${path} = ${value}`];
  if (typeof value !== "object" || value === null) return [];
  return Object.entries(value).flatMap(([key, item]) => unsafe(item, `${path}.${key}`));
}

function safe(path: string, text: string): boolean {
  if ([outcome, ...hostile].some((name) => text.includes(name))) return false;
  const key = path.slice(path.lastIndexOf(".") + 1);
  if (key === "field") return /^[a-z]$/.test(text);
  if (key === "test") return text === "datum.o";
  if (key === "labelExpr") return text === "' '";
  if (["expr", "signal", "calculate", "filter", "href", "url"].includes(key)) return false;
  return key !== "title" || /^[A-Za-z0-9', -]*$/.test(text);
}

test("charts about one coefficient or column find it by its hostile name", () => {
  const { results } = all;
  for (const [kind, which] of [
    ["time-table", "series"],
    ["form", "partial residuals"],
    ["stability", "recursive"],
    ["covariances", "intervals"],
  ] as const) {
    const result = results.get(kind)!;
    assert.ok(chart(result, which, hostile[0]).description.includes("onerror"), kind);
    assert.throws(() => chart(result, which, "no such thing"), /chart: .*no such thing/, kind);
  }
});

test("every kind has tables, each with all its renderings", () => {
  for (const [kind, result] of all.results) {
    const table = tableOf(result);
    const rows = table.rows.length;
    assert.ok(rows > 0, kind);
    for (const row of table.rows) assert.equal(row.length, table.columns.length, kind);
    assert.deepEqual(faults(table.toHtml()), [], kind);
    assert.equal(table.toMarkdown().trimEnd().split("\n").length, rows + 2, kind);
    assert.ok(table.toText().split("\n").length <= rows + 2, kind);
    assert.match(table.toLatex(), /\\end\{tabular\}\n$/, kind);
    assert.ok(table.toCsv().endsWith("\r\n"), kind);
  }
});

test("what is no result, and what a result has not, is refused with what there is", () => {
  const fit = all.fit;
  assert.throws(
    () => chart(fit, "histogram"),
    /chart: a fit result has no chart "histogram"; it has "coefficients"/,
  );
  assert.throws(() => tableOf(fit, "x"), /tableOf: a fit result has no table "x"; it has "coefficients"/);
  assert.throws(() => chart(all.results.get("combination")!), /a combination result has no chart/);
  assert.throws(() => chart(12 as unknown as Result), /chart: takes a result, .* not number/);
  assert.throws(() => tableOf(null as unknown as Result), /not null/);
  assert.throws(() => chart({ kind: "toString" } as unknown as Result), /not a toString result/);
});
