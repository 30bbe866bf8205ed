import assert from "node:assert/strict";
import { test } from "node:test";
import fc from "fast-check";
import { axisFor } from "../../src/show/card/axis.js";
import { timeLine } from "../../src/show/chart/gaps.js";
import { csvTable } from "../../src/show/table/csv.js";
import { estimateCells, estimateColumns } from "../../src/show/table/estimates.js";
import { htmlTable } from "../../src/show/table/html.js";
import type { TableModel } from "../../src/show/table/model.js";
import { plainTable } from "../../src/show/table/plain.js";
import { number, scaleFor, written } from "../../src/show/text/figures.js";
import { html } from "../../src/show/text/html.js";
import { legible, name } from "../../src/show/text/legible.js";
import { width } from "../../src/show/text/width.js";
import { faults, shownText } from "../unit/show/markup.js";

const options = { seed: 20240611, numRuns: 300 };
// Short of the largest numbers, which can be rounded beyond what there is.
const finite = fc.double({ min: -1e308, max: 1e308, noNaN: true });
const anyText = fc.string({ unit: "binary", maxLength: 30 });

/** Reads a written figure back. */
function read(text: string): number {
  const [, sign, figure, power = ""] = /^(−?)([\d,.]+)(?:×10([⁰¹²³⁴⁵⁶⁷⁸⁹⁻]+))?$/.exec(text)!;
  const exponent = [...power].map((c) => "0123456789-"[[..."⁰¹²³⁴⁵⁶⁷⁸⁹⁻"].indexOf(c)]).join("");
  return Number(`${sign ? "-" : ""}${figure!.replaceAll(",", "")}e${exponent || 0}`);
}

test("a written number reads back to the digits that were asked for", () => {
  fc.assert(
    fc.property(finite, fc.integer({ min: 1, max: 12 }), (x, digits) => {
      const back = read(number(x, digits));
      assert.ok(
        Math.abs(back - x) <= 0.51 * 10 ** (1 - digits) * Math.abs(x) + 1e-320,
        `${x} ${number(x, digits)}`,
      );
    }),
    options,
  );
});

test("an estimate is written to within a tenth of its standard error, with no more digits than twelve", () => {
  const size = fc.integer({ min: -18, max: 18 }).map((power) => 10 ** power);
  const one = fc.double({ min: 1, max: 10, noNaN: true });
  fc.assert(
    fc.property(one, size, one, fc.integer({ min: -8, max: 6 }), (a, unit, b, down) => {
      const estimate = a * unit;
      const se = b * unit * 10 ** down;
      const scale = scaleFor([estimate], se);
      const text = written(estimate, scale);
      const digits = text.replace(/×.*/, "").replace(/\D/g, "").replace(/^0+/, "").length;
      assert.ok(digits <= 20, text);
      if (Math.max(estimate, se) / se < 1e9)
        assert.ok(Math.abs(read(text) - estimate) <= 0.1 * se, `${estimate} ${se} ${text}`);
      assert.doesNotMatch(text, /e/);
    }),
    options,
  );
});

test("figures of a column have their points below each other", () => {
  const row = fc.record({
    term: anyText,
    estimate: finite,
    se: fc.double({ min: 1e-12, max: 1e12, noNaN: true }),
    low: finite,
    high: finite,
    p: fc.double({ min: 0, max: 1, noNaN: true }),
  });
  fc.assert(
    fc.property(fc.array(row, { minLength: 1, maxLength: 6 }), (rows) => {
      const columns = estimateColumns(0.95).slice(1, 2);
      const cells = rows.map((one) => estimateCells(one).slice(1, 2));
      const lines = plainTable({ title: "", columns, rows: cells }).split("\n").slice(1);
      const points = lines.filter((line) => line.includes(".")).map((line) => line.indexOf("."));
      assert.ok(new Set(points).size <= 1, lines.join("\n"));
    }),
    options,
  );
});

const texts = fc.array(fc.array(anyText, { minLength: 2, maxLength: 2 }), { maxLength: 5 });

function tableOfTexts(rows: readonly (readonly string[])[]): TableModel {
  return {
    title: "Texts",
    columns: [
      { key: "a", title: "A" },
      { key: "b", title: "B" },
    ],
    rows: rows.map((row) => row.map((text) => ({ text: name(text), value: text }))),
  };
}

test("any text is text in HTML, and reads as it was written", () => {
  fc.assert(
    fc.property(anyText, texts, (text, rows) => {
      const { markup } = html`<p title="${text}">${text}</p>`;
      assert.deepEqual(faults(markup), []);
      assert.equal(shownText(markup), ` ${legible(text)} `);
      assert.deepEqual(faults(htmlTable(tableOfTexts(rows)).markup), []);
    }),
    options,
  );
});

test("any text has one line in plain text, and its second column one place", () => {
  fc.assert(
    fc.property(texts, (rows) => {
      const lines = plainTable(tableOfTexts(rows)).split("\n");
      assert.equal(lines.length, rows.length + 1);
      const first = Math.max(1, ...rows.map((row) => width(name(row[0]!))));
      lines.slice(1).forEach((line, i) => {
        const expected = `${name(rows[i]![0]!)}${" ".repeat(first - width(name(rows[i]![0]!)) + 2)}${name(rows[i]![1]!)}`;
        assert.equal(line, expected.trimEnd());
      });
    }),
    options,
  );
});

test("CSV reads back to the values", () => {
  fc.assert(
    fc.property(texts, (rows) => {
      const safe = rows.map((row) => row.map((text) => (/^[=+\-@\t\r\n]/.test(text) ? `'${text}` : text)));
      assert.deepEqual(parseCsv(csvTable(tableOfTexts(rows))), [["a", "b"], ...safe]);
    }),
    options,
  );
});

/** RFC 4180, as written there. */
function parseCsv(text: string): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  const field = /(?:"((?:[^"]|"")*)"|([^",\r\n]*))(,|\r\n)/gy;
  while (field.lastIndex < text.length) {
    const [, quoted, bare, end] = field.exec(text)!;
    row.push(quoted?.replaceAll('""', '"') ?? bare!);
    if (end === ",") continue;
    rows.push(row);
    row = [];
  }
  return rows;
}

test("an axis holds every interval and rises", () => {
  const ordinary = fc.double({ min: -1e100, max: 1e100, noNaN: true });
  const interval = fc
    .tuple(ordinary, ordinary)
    .map(([a, b]) => ({ low: Math.min(a, b), high: Math.max(a, b) }));
  fc.assert(
    fc.property(fc.array(interval, { minLength: 1, maxLength: 5 }), (intervals) => {
      const axis = axisFor(intervals);
      for (const { low, high } of intervals) {
        assert.ok(axis.position(low) >= 0 && axis.position(high) <= 100 + 1e-9);
        assert.ok(axis.position(high) >= axis.position(low));
      }
      assert.ok(axis.position(0) >= 0 && axis.position(0) <= 100);
      assert.ok(axis.ticks.length >= 1 && axis.ticks.length <= 5, axis.ticks.join());
    }),
    options,
  );
});

test("a thinned line has the extremes of the whole and breaks where the whole does", () => {
  const values = fc.array(
    fc.option(fc.double({ min: -1e9, max: 1e9, noNaN: true }), { freq: 20, nil: Number.NaN }),
    {
      minLength: 50,
      maxLength: 400,
    },
  );
  fc.assert(
    fc.property(values, fc.integer({ min: 1, max: 10 }), (y, bins) => {
      const x = y.map((_, i) => i);
      const few = timeLine(x, y, bins);
      const there = y.filter((v) => !Number.isNaN(v));
      const kept = [...few.y].filter((v) => !Number.isNaN(v));
      assert.equal(Math.max(...kept), Math.max(...there));
      assert.equal(Math.min(...kept), Math.min(...there));
      assert.equal(few.y.some(Number.isNaN), there.length < y.length);
      for (let i = 1; i < few.x.length; i++) assert.ok(few.x[i]! > few.x[i - 1]!);
    }),
    options,
  );
});
