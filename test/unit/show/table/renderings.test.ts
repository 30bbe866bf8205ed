import assert from "node:assert/strict";
import { test } from "node:test";
import { csvTable } from "../../../../src/show/table/csv.js";
import { estimateCells, estimateColumns } from "../../../../src/show/table/estimates.js";
import { htmlTable } from "../../../../src/show/table/html.js";
import { escapeLatex, latexTable } from "../../../../src/show/table/latex.js";
import { escapeMarkdown, markdownTable } from "../../../../src/show/table/markdown.js";
import type { TableModel } from "../../../../src/show/table/model.js";
import { plainTable } from "../../../../src/show/table/plain.js";
import { hostile } from "../hostile.js";
import { faults, shownText } from "../markup.js";

const estimate = (term: string, value: number, se: number, p: number) => ({
  term,
  estimate: value,
  se,
  low: value - 2 * se,
  high: value + 2 * se,
  p,
});
const table: TableModel = {
  title: "Coefficients",
  columns: estimateColumns(0.95),
  rows: [
    estimate("intercept", 12345.678, 1020.3, 0.0001),
    estimate("fare (t−1)", -0.01234, 0.0031, 0.031),
    estimate("日本_x", 23.1, 1.234, 0.2),
  ].map(estimateCells),
};

test("plain text lines figures up at their decimal point, wide letters counted as two", () => {
  assert.equal(
    plainTable(table),
    [
      "Term           Estimate         SE              95% interval        p",
      "                                           from           to",
      "intercept   12,346       1020       10,305       14,386       < 0.001",
      "fare (t−1)      −0.0123     0.0031      −0.0185      −0.0061    0.031",
      "日本_x          23.10       1.23        20.63        25.57      0.200",
    ].join("\n"),
  );
});

test("Markdown", () => {
  assert.equal(
    markdownTable(table),
    [
      "| Term       | Estimate |     SE | 95% interval from | 95% interval to |          p |",
      "| ---------- | -------: | -----: | ----------------: | --------------: | ---------: |",
      "| intercept  |   12,346 |   1020 |            10,305 |          14,386 | &lt; 0.001 |",
      "| fare (t−1) |  −0.0123 | 0.0031 |           −0.0185 |         −0.0061 |      0.031 |",
      "| 日本\\_x    |    23.10 |   1.23 |             20.63 |           25.57 |      0.200 |",
      "",
    ].join("\n"),
  );
});

test("CSV has short names, full precision and a plain minus", () => {
  const lines = csvTable(table).split("\r\n");
  assert.equal(lines[0], "term,estimate,se,low,high,p");
  assert.equal(lines[2], `fare (t−1),-0.01234,0.0031,${-0.01234 - 0.0062},${-0.01234 + 0.0062},0.031`);
  assert.equal(lines.at(-1), "");
});

test("CSV quotes what it must and defuses formulas", () => {
  const rows = ["a,b", 'say "x"', "two\nlines", " pad ", "=1+1", "+1", "-1", "@x", "plain"].map((text) => [
    { text, value: text },
  ]);
  const columns = [{ key: "x", title: "x" }];
  assert.equal(
    csvTable({ title: "", columns, rows }),
    ["x", '"a,b"', '"say ""x"""', '"two\nlines"', '" pad "', "'=1+1", "'+1", "'-1", "'@x", "plain", ""].join(
      "\r\n",
    ),
  );
  const missing = [
    [{ text: "–", value: Number.NaN }],
    [{ text: "", value: null }],
    [{ text: "no", value: false }],
  ];
  assert.equal(csvTable({ title: "", columns, rows: missing }), "x\r\n\r\n\r\nfalse\r\n");
});

test("LaTeX needs no package and lines figures up by two columns", () => {
  const lines = latexTable(table).split("\n");
  assert.equal(lines[1], "\\begin{tabular}{lr@{}lr@{}lr@{}lr@{}lr@{}l}");
  assert.match(
    lines[3]!,
    /^Term & \\multicolumn\{2\}\{c\}\{Estimate\} .*\\multicolumn\{4\}\{c\}\{95\\% interval\}/,
  );
  assert.equal(
    lines[7],
    "fare (t$-$1) & $-$0 & .0123 & 0 & .0031 & $-$0 & .0185 & $-$0 & .0061 & 0 & .031 \\\\",
  );
  const cells = lines.filter((line) => line.endsWith("\\\\")).map((line) => columnsSpanned(line));
  assert.deepEqual([...new Set(cells)], [11]);
});

function columnsSpanned(line: string): number {
  return line
    .split(/(?<!\\)&/)
    .reduce((n, cell) => n + Number(/\\multicolumn\{(\d+)\}/.exec(cell)?.[1] ?? 1), 0);
}

test("signs with a meaning are escaped in LaTeX and Markdown", () => {
  assert.equal(
    escapeLatex("50% of $x_1^2$ & \\{a}~#"),
    "50\\% of \\$x\\_1\\textasciicircum{}2\\$ \\& \\textbackslash{}\\{a\\}\\textasciitilde{}\\#",
  );
  assert.equal(escapeLatex("1.2×10⁻¹² < χ²(3)"), "1.2$\\times$10$^{-12}$ $<$ $\\chi$$^{2}$(3)");
  assert.equal(escapeLatex("Δ₁₂ x, cos 2πt/12"), "$\\Delta$$_{12}$ x, cos 2$\\pi$t/12");
  assert.equal(escapeMarkdown("a|b*c_d`e<f>"), "a\\|b\\*c\\_d\\`e&lt;f&gt;");
});

test("hostile names stay text in every rendering", () => {
  const rows = hostile.map((name) => [...estimateCells(estimate(name, 1, 0.3, 0.01))]);
  const model: TableModel = { title: hostile[0], columns: estimateColumns(0.9), rows };
  const markup = htmlTable(model, { caption: true }).markup;
  assert.deepEqual(faults(markup), []);
  for (const name of hostile.slice(0, 5)) assert.ok(shownText(markup).includes(name), name);
  assert.equal(plainTable(model).split("\n").length, rows.length + 2);
  assert.equal(markdownTable(model).trimEnd().split("\n").length, rows.length + 2);
  assert.doesNotMatch(markdownTable(model), /<(?:img|script|svg)/);
  const latex = latexTable(model).split("\n");
  assert.equal(latex.length, rows.length + 9);
  for (const line of latex.filter((one) => one.endsWith("\\\\"))) assert.equal(columnsSpanned(line), 11);
});

test("a table with no rows", () => {
  const none: TableModel = { title: "None", columns: estimateColumns(0.95), rows: [] };
  assert.deepEqual(faults(htmlTable(none).markup), []);
  assert.match(plainTable(none), /^Term/);
  assert.equal(csvTable(none), "term,estimate,se,low,high,p\r\n");
});

test("a missing estimate leaves dashes, a perfect one its exact figures", () => {
  const nan = Number.NaN;
  const rows = [{ term: "x", estimate: 2, se: nan, low: nan, high: nan, p: nan }].map(estimateCells);
  assert.match(plainTable({ title: "", columns: estimateColumns(0.95), rows }), /x +2.00000 +– +– +– +–$/m);
});

test("a standard error too small for its row is not written as zero", () => {
  const [, value, se] = estimateCells(estimate("x", 1, 1e-15, 0));
  assert.equal(value!.text, "1.00000000000");
  assert.equal(se!.text, "1.0×10⁻¹⁵");
});
