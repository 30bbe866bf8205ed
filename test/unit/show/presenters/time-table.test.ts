import assert from "node:assert/strict";
import { test } from "node:test";
import { load, TimeTable } from "../../../../src/data/index.js";
import { chart, recordType, tableOf } from "../../../../src/show/index.js";
import { shown } from "../all-kinds.js";
import { faults, picturesIn } from "../markup.js";

const rows = Array.from({ length: 24 }, (_, t) => ({
  month: `${2020 + Math.floor(t / 12)}-${String((t % 12) + 1).padStart(2, "0")}`,
  whole: t - 5,
  positive: 0.5 + t,
  any: Math.sin(t),
  flag: t % 2,
  same: 7,
  words: t % 3 === 0 ? "a" : "b",
  holes: t === 4 || t === 5 || t === 20 ? null : t,
}));

test("each column says what it is, its range and where it is missing", async () => {
  const table = await load(rows, { time: "month" });
  const columns = tableOf(table);
  assert.deepEqual(
    columns.rows.map((row) => row.slice(0, 2).map((cell) => cell.text)),
    [
      ["whole", "whole numbers"],
      ["positive", "positive numbers"],
      ["any", "numbers"],
      ["flag", "0 or 1"],
      ["same", "constant"],
      ["words", "text, 2 values"],
      ["holes", "whole numbers"],
    ],
  );
  const holes = columns.rows[6]!;
  assert.deepEqual(
    holes.slice(2).map((cell) => cell.text),
    ["0", "23", "3 (13%)", "2020-05 to 2020-06; 2021-09"],
  );
  assert.equal(holes[4]!.value, 3);
});

test("a complete table has no map of missing periods; one with holes or gaps has", async () => {
  const complete = await load(rows, { time: "month" });
  const plain = (await shown(complete.drop("holes")))["text/plain"] as string;
  assert.doesNotMatch(plain, /Missing periods/);
  assert.match(
    (await shown(complete))["text/plain"] as string,
    /Missing periods +Where\nholes +2020-05 to 2020-06; 2021-09/,
  );
  const gap = await load(
    rows.filter((_, t) => t !== 10 && t !== 11).map(({ holes, ...row }) => row),
    { time: "month" },
  );
  const bundle = await shown(gap);
  assert.match(bundle["text/plain"] as string, /Missing periods +Where\nrows +2020-11 to 2020-12/);
  assert.deepEqual(faults(bundle["text/html"] as string), []);
});

test("filled values are counted and marked", async () => {
  const table = (await load(rows, { time: "month" })).fill("holes", "linear");
  const columns = tableOf(table);
  assert.equal(columns.columns.at(-1)!.title, "Filled");
  assert.equal(columns.rows[6]!.at(-1)!.value, 3);
  const pictures = picturesIn((await shown(table))["text/html"] as string);
  assert.ok(pictures.some((svg) => svg.includes("#D55E00")));
});

test("rows out of order and doubled periods are shown with what to do about them", async () => {
  const { index, columns } = await load(rows.slice(0, 4), { time: "month" });
  const ordinals = Float64Array.from([3, 1, 1, 2], (row) => index.ordinals[row]!);
  const table = new TimeTable({ index: { ...index, ordinals }, columns, provenance: ["made"] });
  const bundle = await shown(table);
  const plain = (bundle["text/plain"] as string).replace(/\n\s+/g, " ");
  assert.match(plain, /Caution: .*\.sort\(\)/);
  assert.match(plain, /Caution: .*\.dedupe\(/);
  assert.deepEqual(faults(bundle["text/html"] as string), []);
  assert.match(chart(table).description, /whole from −5 to −2/);
});

test("the record holds the ranges that the card shows", async () => {
  const table = await load(rows, { time: "month" });
  const record = (await shown(table))[recordType] as {
    fingerprint: string;
    shown: { columns: { name: string; low?: number; high?: number; missing: number }[] };
  };
  assert.equal(record.fingerprint, table.fingerprint);
  const holes = record.shown.columns.find(({ name }) => name === "holes")!;
  assert.deepEqual([holes.low, holes.high, holes.missing], [0, 23, 3]);
});

test("a wide table shows its first columns and says how many more there are", async () => {
  const wide = rows.map(({ month }, t) => ({
    month,
    ...Object.fromEntries(Array.from({ length: 230 }, (_, j) => [`c${j}`, t * j])),
  }));
  const bundle = await shown(await load(wide, { time: "month" }));
  assert.match(bundle["text/plain"] as string, /Not shown: +30 more columns/);
});
