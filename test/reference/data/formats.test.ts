import assert from "node:assert/strict";
import { test } from "node:test";
import { load, type TimeTable } from "../../../src/data/index.js";
import { fixture, fixturePath } from "../../root.js";

/** One table in six formats, written by pyarrow, openpyxl and sqlite3 (make_formats.py). */
const expected = fixture<Record<string, (number | string | null)[]>>("reference/data/formats/expected.json");
const path = (name: string) => fixturePath(`reference/data/formats/${name}`);

function valuesOf(table: TimeTable, name: string): (number | string | null)[] {
  return Array.from(table.column(name).values as ArrayLike<number | string | null>, (value) =>
    typeof value === "number" && Number.isNaN(value) ? null : value,
  );
}

function same(table: TimeTable, names = ["x", "n", "cents", "flag", "place"]): void {
  assert.deepEqual(table.periods, expected.day);
  assert.deepEqual(table.index.step, { unit: "day", count: 1 });
  for (const name of names) assert.deepEqual(valuesOf(table, name), expected[name], name);
}

for (const name of ["days.parquet", "days.arrow", "days-lz4.arrow", "days-stream.arrow", "days.jsonl"]) {
  test(`${name}: every number to the last bit, dates, truth values, texts, missing cells`, async () => {
    const table = await load(path(name), { time: "day" });
    same(table);
    assert.equal(table.column("flag").kind, "boolean");
    assert.equal(table.source!.description, path(name));
    assert.match(table.source!.fingerprint!, /^[0-9a-f]{64}$/);
  });
  test(`${name}: a time stamp with an offset as the time column`, async () => {
    const table = await load(path(name), { time: "at", zone: "Europe/Oslo" });
    assert.deepEqual(table.periods, expected.day);
    assert.deepEqual(valuesOf(table, "n"), expected.n);
    assert.ok(!table.findings.some(({ text }) => text.includes("offset")));
  });
}

test("days.xlsx: the sheet asked for; openpyxl writes 16 digits", async () => {
  const table = await load(path("days.xlsx"), { time: "day", sheet: "days" });
  same(table, ["n", "cents", "flag", "place"]);
  expected.x!.forEach((x, i) => {
    const read = table.numbers("x")[i]!;
    assert.ok(x === null ? Number.isNaN(read) : Math.abs(read - Number(x)) <= 1e-15 * Math.abs(Number(x)));
  });
  assert.deepEqual((await load(path("days.xlsx"), { time: "day", sheet: 2 })).fingerprint, table.fingerprint);
  await assert.rejects(
    load(path("days.xlsx"), { time: "day", sheet: "dys" }),
    /no sheet "dys".*"notes", "days"/,
  );
  await assert.rejects(load(path("days.xlsx"), { time: "day" }), /no time column "day".*"about", "this"/);
});

test("days.sqlite: the rows of a query", async () => {
  const table = await load({ database: path("days.sqlite"), sql: "select * from days" }, { time: "day" });
  same(table);
  assert.equal(table.column("flag").kind, "number");
  const some = await load(
    { database: path("days.sqlite"), sql: "select day, x * 2 as twice from days where n > 0 limit 5;" },
    { time: "day" },
  );
  assert.equal(some.T, 5);
  assert.equal(some.numbers("twice")[0], 2 * Number(expected.x![1]));
  const bad = load({ database: path("days.sqlite"), sql: "select day from dyas" }, { time: "day" });
  await assert.rejects(bad, /InputError: load: the query on .*days.sqlite failed: .*dyas/);
  await assert.rejects(load(path("days.sqlite"), { time: "day" }), /is a database; give a query/);
});

test("the numbers have one fingerprint, whatever the format", async () => {
  const names = ["x", "n", "cents", "flag", "place"];
  const prints = new Set<string>();
  const files = new Set<string>();
  for (const name of ["days.parquet", "days.arrow", "days-stream.arrow", "days.jsonl"]) {
    const table = (await load(path(name), { time: "day" })).select(...names);
    prints.add(table.fingerprint);
    files.add(table.source!.fingerprint!);
  }
  const rows = expected.day!.map((day, i) => ({
    day,
    ...Object.fromEntries(names.map((name) => [name, expected[name]![i]])),
    flag: expected.flag![i] === null ? null : expected.flag![i] === 1,
  }));
  prints.add((await load(rows, { time: "day" })).fingerprint);
  assert.equal(prints.size, 1);
  assert.equal(files.size, 4);
});

test("an Arrow file in a compression that cannot be read is refused with the way out", async () => {
  await assert.rejects(
    load(path("days-zstd.arrow"), { time: "day" }),
    /Zstandard; save it with LZ4, uncompressed, or as Parquet/,
  );
});

test("LZ4: long columns, in several blocks, with matches that run into themselves", async () => {
  const table = await load(path("long-lz4.arrow"), { time: "t" });
  assert.equal(table.T, 12_000);
  const x = table.numbers("x");
  assert.ok(x.every((value, i) => value === (i % 1000 < 500 ? 7 : i / 3)));
});

test("hours.xlsx: whole hours on the stated clock, a blank row passed over, the sheet's row in errors", async () => {
  const options = { time: "hour", skip: 2, zone: "Europe/Oslo" };
  await assert.rejects(
    load(path("hours.xlsx"), { time: "hour" }),
    /column 2 of sheet "Sheet" .* has no name.*skip: 2/,
  );
  await assert.rejects(
    load(path("hours.xlsx"), options),
    /row 9 \(line 13\) of .*column "count": "eight" is not a number/,
  );
  const table = await load(path("hours.xlsx"), { ...options, missing: ["eight"] });
  assert.deepEqual(
    [table.periods[0], table.periods[8]],
    ["2024-10-26 16:00+02:00", "2024-10-27 00:00+02:00"],
  );
  assert.deepEqual(Array.from(table.numbers("count")), [0, 1, Number.NaN, 3, 4, 5, 6, 7, Number.NaN]);
  assert.equal(table.findings[0]!.text, "1 blank row was passed over");
});
