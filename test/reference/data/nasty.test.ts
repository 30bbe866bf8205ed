import assert from "node:assert/strict";
import { mkdtempSync, readdirSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { basename, join } from "node:path";
import { after, test } from "node:test";
import { load, type TimeTable } from "../../../src/data/index.js";
import { InputError } from "../../../src/numeric/index.js";
import { fixture, fixturePath } from "../../root.js";

/**
 * Hostile files with what a careful reader does with each (expected.json, fields `must` and `never`). Here: how they
 * are loaded; what a regression on them gives is checked in nasty-fit.test.ts.
 */
const cases = fixture<{ file?: string; id: string; outcome: string }[]>("reference/data/nasty/expected.json");
const folder = fixturePath("reference/data/nasty");
const file = (name: string) => join(folder, name);
const open = (name: string, options = {}) => load(file(name), { time: "time", ...options });
const texts = (table: TimeTable) => table.findings.map(({ text }) => text);

async function clean(): Promise<TimeTable> {
  return open("00_clean.csv");
}

/** Same index and same numbers, bit for bit, whatever the columns are called. */
async function sameNumbers(table: TimeTable): Promise<void> {
  const expected = await clean();
  assert.deepEqual(table.index.ordinals, expected.index.ordinals);
  const values = (of: TimeTable) =>
    of.columns.slice(0, expected.columns.length).map((column) => column.values);
  assert.deepEqual(values(table), values(expected));
}

async function refused(name: string, ...parts: (string | RegExp)[]): Promise<void> {
  await assert.rejects(open(name), (error: Error) => {
    assert.ok(error instanceof InputError, error.stack);
    for (const part of parts) {
      if (typeof part === "string") assert.ok(error.message.includes(part), `${part} in: ${error.message}`);
      else assert.match(error.message, part);
    }
    assert.ok(error.message.includes(name));
    return true;
  });
}

test("the clean file says nothing and holds 24 months", async () => {
  const table = await clean();
  assert.equal(table.T, 24);
  assert.deepEqual(table.findings, []);
  assert.deepEqual(table.names, ["y", "x1", "x2"]);
  assert.equal(table.periods[0], "2019-01");
});

test("01: the gap is said and stays a gap", async () => {
  const table = await open("01_time_gap.csv");
  assert.equal(table.T, 23);
  assert.deepEqual(texts(table), ["1 month is absent in 1 gap, first 2019-07"]);
  assert.equal(table.index.ordinals[6]! - table.index.ordinals[5]!, 2);
});

test("02: a doubled period is refused with its rows, and made one when asked", async () => {
  await refused(
    "02_duplicate_timestamp.csv",
    "rows 8 and 9",
    "2019-08-01",
    "agree in every column",
    "dedupe:",
  );
  const table = await open("02_duplicate_timestamp.csv", { dedupe: "identical" });
  await sameNumbers(table);
  assert.match(table.provenance[1]!, /1 rows removed in 1 periods/);
  const found = await open("02_duplicate_timestamp.csv", { asFound: true });
  assert.equal(found.T, 25);
  assert.match(texts(found).join(), /rows 8 and 9 both stand for 2019-08/);
  await sameNumbers(found.dedupe("first"));
});

test("03: unsorted rows are refused, and sorted when asked", async () => {
  await refused("03_unsorted_rows.csv", "not in order of time", "row 2", "sort: true");
  const table = await open("03_unsorted_rows.csv", { sort: true });
  await sameNumbers(table);
  assert.match(table.provenance[1]!, /sorted by time: \d+ rows moved/);
  await sameNumbers((await open("03_unsorted_rows.csv", { asFound: true })).sort());
});

test("04: the first row written in another form is named", async () => {
  await refused(
    "04_mixed_date_formats.csv",
    "row 4 (line 5)",
    '"01/04/2019"',
    "cannot be told apart",
    '"time"',
  );
});

test("05: missing values are counted by column and marker", async () => {
  const table = await open("05_missing_values.csv");
  assert.equal(texts(table)[0], 'read as missing: 1 "NA" in "y"; 1 blank in "x1"; 1 blank in "x2"');
  const missing = table.columns.map(({ values }) =>
    Array.from(values as Float64Array).flatMap((x, row) => (Number.isNaN(x) ? [row + 1] : [])),
  );
  assert.deepEqual(missing, [[9], [5], [16]]);
});

test("07: thousands separators are read and said", async () => {
  const table = await open("07_thousands_separator.csv");
  assert.deepEqual(texts(table), ['numbers have "," between thousands']);
  const expected = await clean();
  expected.columns.forEach((column, i) => {
    const scaled = (column.values as Float64Array).map((x) => Math.round(x * 1e6) / 1e3);
    assert.deepEqual(table.columns[i]!.values, scaled);
  });
});

for (const [name, said] of [
  ["08_decimal_comma_semicolon.csv", ["columns are separated by semicolons", "numbers have a decimal comma"]],
  ["09_utf8_bom.csv", []],
  ["10_crlf.csv", []],
  ["23_nonascii_names.csv", []],
  ["25n_html_injection.csv", []],
  ["26n_quoted_newline.csv", []],
  ["26p_quoted_newline_cell.csv", []],
  ["27_own_intercept_column.csv", []],
  ["28_tab_separated.csv", ["columns are separated by tabs"]],
  ["29_blank_lines.csv", ["2 blank lines were passed over, first line 11"]],
  ["35_latin1.csv", ["the file is not UTF-8 and was read as Windows-1252, which Latin-1 is a part of"]],
  ["38_y_on_both_sides.csv", []],
] as const) {
  test(`${name}: the same numbers as the clean file, and what was taken care of`, async () => {
    const table = await open(name);
    await sameNumbers(table);
    assert.deepEqual(texts(table), said);
  });
}

test("names stand exactly as in the file", async () => {
  const names = async (name: string) => (await open(name)).names.slice(0, 3);
  assert.deepEqual(await names("09_utf8_bom.csv"), ["y", "x1", "x2"]);
  assert.equal((await open("09_utf8_bom.csv")).index.name, "time");
  assert.deepEqual(await names("23_nonascii_names.csv"), ["größe", "气温", "naïve é"]);
  assert.deepEqual(await names("24n_operator_names.csv"), ["y ~ x", "a + b", "log(x)"]);
  assert.deepEqual(await names("25n_html_injection.csv"), [
    "<img src=x onerror=alert(1)>",
    "<script>alert(2)</script>",
    '"><svg onload=alert(3)>',
  ]);
  assert.deepEqual(await names("26n_quoted_newline.csv"), ["y\nline two", 'x "quoted"', "x2, with comma"]);
  assert.deepEqual(await names("35_latin1.csv"), ["y", "größe", "x2"]);
});

test("26p: a note with a newline is one cell, and lines are still counted right", async () => {
  const note = (await open("26p_quoted_newline_cell.csv")).column("note");
  assert.equal(note.kind, "text");
  assert.match(String(note.values[3]), /\n.*,|,.*\n/s);
});

test("11, 12: nothing to load", async () => {
  await refused("11_empty_file.csv", "is empty");
  await refused("12_header_only.csv", "no rows");
});

test("15: columns scaled by 1e-12 and 1e12 keep every digit", async () => {
  const [scaled, plain] = [await open("15_scaled_columns.csv"), await clean()];
  for (const [name, unit] of [
    ["x1", "1e-12"],
    ["x2", "1e12"],
  ] as const) {
    const back = Array.from(plain.numbers(name), (x) => x * Number(unit));
    assert.deepEqual(Array.from(scaled.numbers(name)), back);
  }
});

test("18, 24, 25, 26, 36: refused with the place and the way out", async () => {
  await refused("18_inf.csv", "row 6 (line 7)", '"x1"', "infinite");
  await refused("24_ragged_short_row.csv", "row 7 (line 8)", "3 fields", "4 columns");
  await refused("25_duplicate_names.csv", '"x1"', "columns 3 and 4");
  await refused("26_text_in_numeric.csv", "row 8 (line 9)", '"x1"', '"10.88a"', "missing:", "text:");
  await refused("36_no_header.csv", "looks like data", "names:");
});

test("36: with names said, no row is lost", async () => {
  await sameNumbers(await open("36_no_header.csv", { names: ["time", "y", "x1", "x2"] }));
});

test("every file that must run loads, and every refusal is an InputError", async () => {
  for (const { file: name, outcome, id } of cases) {
    if (!name?.endsWith(".csv")) continue;
    try {
      const table = await open(basename(name));
      assert.ok(table.T > 0, id);
    } catch (error) {
      assert.ok(error instanceof InputError, `${id}: ${(error as Error).stack}`);
      assert.notEqual(outcome, "run", `${id}: ${error.message}`);
    }
  }
  assert.ok(readdirSync(folder).filter((name) => name.endsWith(".csv")).length >= 33);
});

const scratch = mkdtempSync(join(tmpdir(), "lagbook-nasty-"));
after(() => rmSync(scratch, { recursive: true }));

test("a folder and a missing file are said, with the nearest name", async () => {
  await assert.rejects(load(scratch, { time: "time" }), /is a folder/);
  await assert.rejects(open("00_claen.csv"), /no file .*Did you mean "00_clean.csv"/);
  await assert.rejects(load(join(scratch, "none", "a.csv"), { time: "t" }), /There is no folder/);
});
