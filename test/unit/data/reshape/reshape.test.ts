import assert from "node:assert/strict";
import { test } from "node:test";
import { first, last, load, max, mean, min, sum, TimeTable } from "../../../../src/data/index.js";
import { months, table } from "../tables.js";

const x = (of: TimeTable) => Array.from(of.numbers("x"));

test("between takes both ends, and a longer period whole", async () => {
  const two = await months(24);
  assert.deepEqual(x(two.between("2020-11", "2021-02")), [11, 12, 13, 14]);
  assert.deepEqual(x(two.between("2021-11")), [23, 24]);
  assert.deepEqual(x(two.between(undefined, "2020Q1")), [1, 2, 3]);
  assert.equal(two.between("2021", "2021").T, 12);
  assert.equal(two.between(2021, 2021).T, 12);
  assert.equal(two.between("2020-03-15", "2020-04-01").T, 2);
  assert.throws(
    () => two.between("2030"),
    /no row lies between 2030 and the end; the table spans 2020-01 to 2021-12/,
  );
  assert.throws(() => two.between("Marrch"), /"Marrch" cannot be read as a period .*written like "2024-03"/);
  assert.match(two.between("2021").provenance.at(-1)!, /12 rows kept, 12 left out/);
});

test("business days between dates of a weekend", async () => {
  const days = await load(
    ["2024-03-07", "2024-03-08", "2024-03-11", "2024-03-12"].map((t, i) => ({ t, x: i })),
    { time: "t" },
  );
  assert.deepEqual(x(days.between("2024-03-08", "2024-03-10")), [1]);
  assert.deepEqual(x(days.between("2024-03-09", "2024-03-11")), [2]);
});

test("to a coarser step by each function", async () => {
  const six = await months(6);
  for (const [how, expected] of [
    [sum, [6, 15]],
    [mean, [2, 5]],
    [first, [1, 4]],
    [last, [3, 6]],
    [max, [3, 6]],
    [min, [1, 4]],
    [(values: Float64Array) => values[1]! ** 2, [4, 25]],
  ] as const) {
    const quarters = six.to("quarter", { x: how });
    assert.deepEqual([x(quarters), quarters.periods], [expected, ["2020Q1", "2020Q2"]]);
  }
  assert.equal(six.to("quarter", { x: sum }).provenance.at(-1), "to quarter: x by sum; left out: y");
  assert.throws(() => six.to("week", { x: sum }), /week is not coarser than this table's step, month/);
  assert.throws(() => six.to("quarter", { z: sum }), /no column "z"/);
  assert.throws(() => six.to("quarter", { x: () => 1 / 0 }), /function for "x" gives Infinity in 2020Q1/);
  assert.throws(() => six.to("quarter", { x: () => "a" as never }), /gives a in 2020Q1/);
});

test("part periods are refused, left out or kept, as said", async () => {
  const seven = await months(7);
  assert.throws(
    () => seven.to("quarter", { x: sum }),
    /2020Q3 is only partly covered \(1 of 3 periods of one month\).*parts: "leave out"/,
  );
  assert.deepEqual(x(seven.to("quarter", { x: sum }, { parts: "leave out" })), [6, 15]);
  assert.deepEqual(x(seven.to("quarter", { x: sum }, { parts: true })), [6, 15, 7]);
  const gap = await table(["2020-01", "2020-03", "2020-04", "2020-05", "2020-06"], [1, 3, 4, 5, 6]);
  assert.throws(() => gap.to("quarter", { x: sum }), /2020Q1 is only partly covered \(2 of 3/);
  assert.match(
    gap.to("quarter", { x: sum }, { parts: true }).provenance.at(-1)!,
    /part periods aggregated as they are/,
  );
});

test("a missing value makes its coarse period missing; filled ones mark theirs", async () => {
  const holes = await months(6, (i) => (i === 1 ? null : i + 1));
  assert.deepEqual(x(holes.to("quarter", { x: mean })), [Number.NaN, 5]);
  const quarters = holes.fill("x", 9).to("quarter", { x: sum });
  assert.deepEqual(
    [x(quarters), Array.from(quarters.column("x").filled!)],
    [
      [13, 15],
      [1, 0],
    ],
  );
});

test("weeks count to the month in which they start, which is recorded", async () => {
  const weeks = await load(
    Array.from({ length: 9 }, (_, i) => ({ t: `2021-W${String(i + 1).padStart(2, "0")}`, x: i + 1 })),
    { time: "t" },
  );
  const january = weeks.to("month", { x: sum }, { parts: "leave out" });
  assert.deepEqual(
    [january.periods, x(january)],
    [
      ["2021-01", "2021-02"],
      [1 + 2 + 3 + 4, 5 + 6 + 7 + 8],
    ],
  );
  assert.match(january.provenance.at(-1)!, /each week counts to the month in which it starts/);
});

test("define, select, rename, drop, dropMissing", async () => {
  const five = await months(5, (i) => (i === 2 ? null : i));
  const more = five.define({
    twice: (row) => row.x * 2,
    late: (row) => row.period >= "2020-03",
    name: (row, i) => (i === 0 ? null : `m${row.x}`),
  });
  assert.deepEqual(Array.from(more.numbers("twice")), [0, 2, Number.NaN, 6, 8]);
  assert.deepEqual([more.column("late").kind, more.column("name").kind], ["boolean", "text"]);
  assert.deepEqual(more.select("twice", "x").names, ["twice", "x"]);
  assert.deepEqual(more.drop("y", "name").names, ["x", "twice", "late"]);
  assert.deepEqual(five.rename({ x: "fare" }).names, ["fare", "y"]);
  assert.deepEqual(five.define({ x: (row) => row.y / 10 }).names, ["x", "y"]);
  const kept = five.dropMissing("x");
  assert.deepEqual(
    [kept.periods, kept.provenance.at(-1)],
    [["2020-01", "2020-02", "2020-04", "2020-05"], "rows with a missing value dropped: 1, first 2020-03"],
  );
  assert.throws(() => five.define({ z: (row) => row.fare }), /no column "fare"/);
  assert.throws(() => five.define({ z: (row) => 1 / (row.y - 10) }), /"z" is infinite in 2020-02 \(row 2\)/);
  assert.throws(
    () => five.define({ z: (row) => Math.log(-1 - row.y) }),
    /"z" is not a number in 2020-01 \(row 1\) although nothing is missing/,
  );
  assert.throws(() => five.rename({ x: "y" }), /two columns would be called "y"/);
  assert.throws(() => five.rename({ z: "y" }), /no column "z"/);
  assert.throws(() => five.drop("z"), /no column "z"/);
});

test("sort and dedupe", async () => {
  const messy = await table(["2020-03", "2020-01", "2020-01", "2020-02"], [3, 1, 2, 5]);
  assert.deepEqual(x(messy.sort()), [1, 2, 5, 3]);
  assert.deepEqual(x(messy.sort().dedupe("first")), [1, 5, 3]);
  assert.deepEqual(x(messy.dedupe("last").sort()), [2, 5, 3]);
  assert.deepEqual(x(messy.dedupe("mean")), [3, 1.5, 5]);
  assert.throws(() => messy.dedupe("identical"), /rows 2 and 3, both 2020-01, differ in "x" \(1 and 2\)/);
  assert.throws(() => messy.dedupe("any" as never), /none of "identical", "first", "last", "mean"/);
  for (const work of [
    (t: TimeTable) => t.fill("x", "linear"),
    (t: TimeTable) => t.to("quarter", { x: sum }),
  ]) {
    assert.throws(
      () => work(messy),
      /not in order of time: row 2 \(2020-01\) comes after row 1 \(2020-03\). Sort them/,
    );
  }
});

test("fill each way; gaps become rows; what is filled is marked", async () => {
  const gap = await table(["2020-01", "2020-02", "2020-05", "2020-06"], [1, null, 5, null]);
  const filled = (how: Parameters<TimeTable["fill"]>[1]) => gap.fill("x", how);
  assert.deepEqual(x(filled("linear")), [1, 2, 3, 4, 5, Number.NaN]);
  assert.deepEqual(x(filled("previous")), [1, 1, 1, 1, 5, 5]);
  assert.deepEqual(x(filled(0)), [1, 0, 0, 0, 5, 0]);
  assert.deepEqual(Array.from(filled("linear").column("x").filled!), [0, 1, 1, 1, 0, 0]);
  assert.deepEqual(Array.from(filled("linear").numbers("y")), [
    10,
    Number.NaN,
    Number.NaN,
    Number.NaN,
    50,
    Number.NaN,
  ]);
  assert.equal(
    filled("linear").provenance.at(-1),
    "filled x by linear: 3 values; 2 absent periods became rows",
  );
  const seasons = await months(24, (i) => (i === 15 ? null : (i % 12) + (i < 12 ? 0 : 1)));
  assert.equal(seasons.fill("x", "seasonal").numbers("x")[15], 3);
  assert.throws(() => filled("sideways" as never), /no way to fill. There are "previous", "linear"/);
  assert.throws(() => filled({ value: "text" }), /holds numbers and cannot be filled with "text"/);
  assert.throws(() => gap.fill("z", 0), /no column "z"/);
});

test("join at the same step and at a coarser one, overhang as said", async () => {
  const fine = await months(6);
  const coarse = await load(
    [
      { t: "2020Q1", rate: 1 },
      { t: "2020Q2", rate: 2 },
    ],
    { time: "t" },
  );
  assert.deepEqual(Array.from(fine.join(coarse).numbers("rate")), [1, 1, 1, 2, 2, 2]);
  const longer = await months(8);
  assert.throws(
    () => longer.join(coarse),
    /2 of 8 rows have no period in the other table \(2020Q1 to 2020Q2.*overhang: "keep"/,
  );
  assert.deepEqual(Array.from(longer.join(coarse, { overhang: "keep" }).numbers("rate")).slice(5), [
    2,
    Number.NaN,
    Number.NaN,
  ]);
  assert.equal(longer.join(coarse, { overhang: "cut" }).T, 6);
  assert.throws(
    () => coarse.join(fine),
    /other table's step \(month\) is finer than.*quarter.*\.to\("quarter"/,
  );
  assert.throws(() => fine.join(fine), /both tables have a column "x"; rename/);
  const far = await load(
    [
      { t: "1999Q1", z: 1 },
      { t: "1999Q2", z: 2 },
    ],
    { time: "t" },
  );
  assert.throws(() => fine.join(far), /no period in common/);
});

test("days and business days are matched by date", async () => {
  const day = (t: string, a: number) => ({ t, a });
  const work = await load(
    ["2024-03-07", "2024-03-08", "2024-03-11"].map((t, i) => ({ t, b: i })),
    { time: "t" },
  );
  const all = await load(["2024-03-07", "2024-03-08", "2024-03-09", "2024-03-10", "2024-03-11"].map(day), {
    time: "t",
  });
  assert.deepEqual(Array.from(work.join(all).numbers("a")), [0, 1, 4]);
  assert.deepEqual(Array.from(all.join(work, { overhang: "keep" }).numbers("b")), [
    0,
    1,
    Number.NaN,
    Number.NaN,
    2,
  ]);
  assert.deepEqual(Array.from(work.to("week", { b: sum }, { parts: true }).numbers("b")), [1, 2]);
});

test("hours join the days of their own clock", async () => {
  const zone = "Europe/Oslo";
  const hours = await load(
    ["2024-03-30T22:00Z", "2024-03-30T23:00Z", "2024-03-31T00:00Z"].map((t, i) => ({ t, x: i })),
    { time: "t", zone },
  );
  const days = await load(
    [
      { t: "2024-03-30", d: 30 },
      { t: "2024-03-31", d: 31 },
    ],
    { time: "t" },
  );
  assert.deepEqual(Array.from(hours.join(days).numbers("d")), [30, 31, 31]);
});

test("a table is not changed by what is made of it", async () => {
  const one = await months(12, (i) => (i === 4 ? null : i));
  const before = JSON.stringify(one.toJSON());
  one
    .fill("x", "linear")
    .define({ x: () => 0 })
    .rename({ y: "z" })
    .between("2020-02")
    .dropMissing();
  assert.equal(JSON.stringify(one.toJSON()), before);
  assert.ok(one instanceof TimeTable);
});
