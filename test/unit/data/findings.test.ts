import assert from "node:assert/strict";
import { test } from "node:test";
import { gapsOf, load, missingStretches, periodLabel, smallLine } from "../../../src/data/index.js";
import { months, table } from "./tables.js";

const texts = (of: { findings: readonly { text: string }[] }) => of.findings.map(({ text }) => text);

test("gaps are counted in periods and named by the first", async () => {
  const some = await table(["2020-01", "2020-02", "2020-05", "2020-06", "2020-08"], [1, 2, 3, 4, 5]);
  assert.deepEqual(texts(some), ["3 months are absent in 2 gaps, first 2020-03"]);
  const gaps = gapsOf(some.index).map(({ first, last }) =>
    [first, last].map((at) => periodLabel(some.index, at)),
  );
  assert.deepEqual(gaps, [
    ["2020-03", "2020-04"],
    ["2020-07", "2020-07"],
  ]);
});

test("columns that begin late, end early, miss values inside, or are empty", async () => {
  const late = await months(8, (i) => (i < 2 || i === 4 || i === 7 ? null : i + 0.5));
  assert.deepEqual(texts(late).slice(0, 3), [
    '"x" begins only in 2020-03',
    '"x" ends already in 2020-07',
    '"x" is missing in 1 of 8 rows inside its span, first 2020-05',
  ]);
  assert.equal(texts(await months(3, () => null))[0], '"x" is missing throughout');
  const [summary] = late.summaries;
  assert.deepEqual(
    {
      ...summary,
      stretches: summary!.stretches.map(({ first, last }) => [periodLabel(late.index, first), last - first]),
    },
    {
      name: "x",
      kind: "positive numbers",
      low: 2.5,
      high: 6.5,
      mean: 4.5,
      missing: 4,
      leading: 2,
      trailing: 1,
      filled: 0,
      stretches: [
        ["2020-01", 1],
        ["2020-05", 0],
        ["2020-08", 0],
      ],
    },
  );
  assert.equal(missingStretches(late.column("x"), late.index).length, 3);
});

test("what kind of number a column holds", async () => {
  const kinds = async (values: (number | string | boolean | null)[]) => {
    const rows = values.map((a, i) => ({ t: 1900 + i, a }));
    return (await load(rows, { time: "t" })).summaries[0]!.kind;
  };
  assert.equal(await kinds([1.5, -2]), "numbers");
  assert.equal(await kinds([1.5, 2]), "positive numbers");
  assert.equal(await kinds([1, -2]), "whole numbers");
  assert.equal(await kinds([1, 2]), "positive whole numbers");
  assert.equal(await kinds([0, 1, null]), "0 or 1");
  assert.equal(await kinds([3, 3]), "constant");
  assert.equal(await kinds([true, false]), "yes or no");
  assert.equal(await kinds(["a", "b", "a"]), "text, 2 values");
});

test("a number that may stand for a missing value is pointed at, others are not", async () => {
  const some = await months(12, (i) => (i % 5 === 0 ? -999 : 20 + i));
  assert.match(
    texts(some)[0]!,
    /"x" is -999 in 3 rows and otherwise from 21 to 31; .*missing: \[..., "-999"\]/,
  );
  assert.deepEqual(texts(await months(12, (i) => (i === 5 ? -999 : 20 + i))), []);
  assert.deepEqual(texts(await months(12, (i) => (i % 5 === 0 ? -99 : 100 * i - 500))), []);
});

test("filled values are counted on every later table", async () => {
  const holes = await months(6, (i) => (i === 2 || i === 3 ? null : i));
  const filled = holes.fill("x", "linear").define({ z: (row) => row.x * 2 });
  assert.equal(texts(filled)[0], '2 values of "x" were filled in, not observed');
  assert.equal(filled.summaries[0]!.filled, 2);
});

test("a small line has at most as many stretches as asked and loses no extreme", async () => {
  const long = await months(500, (i) => (i === 333 ? 1e6 : i % 7));
  const line = smallLine(long.column("x"), long.index, 50);
  assert.ok(line.length <= 50);
  assert.equal(Math.max(...line.map(({ high }) => high)), 1e6);
  assert.equal(
    line.reduce((sum, { count }) => sum + count, 0),
    500,
  );
});

test("the record holds findings, provenance, summaries and fingerprints", async () => {
  const record = JSON.parse(JSON.stringify((await months(4, (i) => (i === 1 ? null : i))).toJSON()));
  assert.equal(record.kind, "time-table");
  assert.equal(record.span, "2020-01 to 2020-04, every month");
  assert.deepEqual(record.columns[0].missingPeriods, [["2020-02", "2020-02"]]);
  assert.equal(record.columns[0].kind, "number");
  assert.match(record.fingerprint, /^[0-9a-f]{64}$/);
  assert.equal(record.provenance.length, 1);
});

test("the fingerprint is of the numbers: it changes with any of them, with names, step and periods", async () => {
  const one = await months(5);
  assert.equal((await months(5)).fingerprint, one.fingerprint);
  const others = [
    await months(5, (i) => (i === 3 ? 4.000000000000001 : i + 1)),
    one.rename({ x: "X" }),
    one.select("y", "x"),
    one.between("2020-02"),
    await table(["2021-01", "2021-02", "2021-03", "2021-04", "2021-05"], [1, 2, 3, 4, 5]),
  ];
  assert.equal(new Set([one, ...others].map(({ fingerprint }) => fingerprint)).size, 6);
  const zero = (x: number) =>
    load(
      [
        { t: 1, x },
        { t: 2, x: 1 },
      ],
      { time: "t" },
    );
  assert.equal((await zero(-0)).fingerprint, (await zero(0)).fingerprint);
});
