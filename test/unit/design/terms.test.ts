import assert from "node:assert/strict";
import { test } from "node:test";
import { load, mean, type TimeTable } from "../../../src/data/index.js";
import {
  between,
  categories,
  columnsOf,
  diff,
  fourier,
  growth,
  lag,
  lags,
  lead,
  log,
  own,
  product,
  pulse,
  ramp,
  rolling,
  seasonal,
  standardise,
  step,
  type TermLike,
  times,
  trend,
} from "../../../src/design/index.js";
import { agree } from "../../support/digits.js";

const weeks = (labels: readonly string[], make: (i: number) => object) =>
  load(labels.map((week, i) => ({ week, ...make(i) })) as never, { time: "week" });
const labels = Array.from({ length: 10 }, (_, i) => `2024-W${String(i + 1).padStart(2, "0")}`);
const regular = () => weeks(labels, (i) => ({ x: i * i + 1, group: i % 3 === 0 ? "b" : "a" }));
/** Weeks 1 to 10 without weeks 4 and 5. */
const gapped = () =>
  weeks(
    labels.filter((_, i) => i !== 3 && i !== 4),
    (i) => ({ x: i }),
  );

const only = (term: TermLike, table: TimeTable) => columnsOf(term, table)[0]!;
const values = (term: TermLike, table: TimeTable) => [...only(term, table).values];
const names = (term: TermLike, table: TimeTable) => columnsOf(term, table).map(({ label }) => label);

test("labels are written as the trade writes them, and nest", async () => {
  const table = await regular();
  assert.deepEqual(names([lag("x"), lag("x", 3), lead("x"), ...lags("x", 0, 1)], table), [
    "x (t−1)",
    "x (t−3)",
    "x (t+1)",
    "x",
    "x (t−1)",
  ]);
  assert.deepEqual(names([lag(log("x"), 2), log(lag("x")), lag(lag("x")), lead(lag("x"))], table), [
    "log x (t−2)",
    "log x (t−1)",
    "x (t−2)",
    "x",
  ]);
  assert.deepEqual(names([diff("x"), diff("x", { order: 2 }), growth("x"), diff("x", { over: 3 })], table), [
    "Δ x",
    "Δ Δ x",
    "Δ log x",
    "Δ3 x",
  ]);
  assert.deepEqual(names([trend(3), product("x", trend()), times("x", 100)], table), [
    "trend",
    "trend²",
    "trend³",
    "x × trend",
    "100 × x",
  ]);
  assert.deepEqual(
    names([step("2024-W03"), pulse("2024-W03"), ramp("2024-W03"), between("2024-W03", "2024-W05")], table),
    ["from 2024-W03", "in 2024-W03", "since 2024-W03", "2024-W03 to 2024-W05"],
  );
  assert.deepEqual(names([rolling("x", mean, 4), standardise("x"), own("mine", (r) => r["x"])], table), [
    "mean of 4 x",
    "x, standardised",
    "mine",
  ]);
});

test("a lag steps in time: across a gap it is missing, at the start it is beyond the table", async () => {
  const table = await gapped(); // rows stand for weeks 1 2 3 6 7 8 9 10
  const column = only(lag("x"), table);
  assert.deepEqual([...column.values], [NaN, 0, 1, NaN, 3, 4, 5, 6]);
  assert.deepEqual([...column.edge!], [1, 0, 0, 0, 0, 0, 0, 0]);
  assert.deepEqual(values(lag("x", 3), table), [NaN, NaN, NaN, 2, NaN, NaN, 3, 4]);
  assert.deepEqual(values(lead("x"), table), [1, 2, NaN, 4, 5, 6, 7, NaN]);
  assert.deepEqual(values(diff("x"), table), [NaN, 1, 1, NaN, 1, 1, 1, 1]);
  assert.deepEqual(values(rolling("x", mean, 2), table), [NaN, 0.5, 1.5, NaN, 3.5, 4.5, 5.5, 6.5]);
  assert.deepEqual(values(trend(), table), [1, 2, 3, 6, 7, 8, 9, 10]);
});

test("steps, pulses and ramps begin in the period that they name", async () => {
  const table = await regular();
  assert.deepEqual(values(step("2024-W08"), table), [0, 0, 0, 0, 0, 0, 0, 1, 1, 1]);
  assert.deepEqual(values(pulse("2024-W08"), table), [0, 0, 0, 0, 0, 0, 0, 1, 0, 0]);
  assert.deepEqual(values(ramp("2024-W08"), table), [0, 0, 0, 0, 0, 0, 0, 1, 2, 3]);
  assert.deepEqual(values(between("2024-W02", "2024-W03"), table), [0, 1, 1, 0, 0, 0, 0, 0, 0, 0]);
});

test("seasons against the first, against their mean, or each on its own", async () => {
  const rows = Array.from({ length: 8 }, (_, i) => ({
    q: `${2020 + Math.floor(i / 4)}Q${(i % 4) + 1}`,
    x: i,
  }));
  const table = await load(rows, { time: "q" });
  assert.deepEqual(names(seasonal(), table), ["Q2", "Q3", "Q4"]);
  assert.deepEqual(values(seasonal(), table), [0, 1, 0, 0, 0, 1, 0, 0]);
  const zero = columnsOf(seasonal({ contrast: "sum-to-zero" }), table);
  assert.deepEqual(
    zero.map(({ label }) => label),
    ["Q1", "Q2", "Q3"],
  );
  for (const { values: column } of zero)
    assert.equal(
      column.reduce((sum, value) => sum + value, 0),
      0,
    );
  assert.deepEqual(names(seasonal({ contrast: "all" }), table), ["Q1", "Q2", "Q3", "Q4"]);
  assert.match(only(seasonal(), table).note!, /measured against Q1/);
});

test("waves repeat with their period; the sine at half the period is left out", async () => {
  const rows = Array.from({ length: 24 }, (_, i) => ({
    q: `${2020 + Math.floor(i / 4)}Q${(i % 4) + 1}`,
    x: i,
  }));
  const table = await load(rows, { time: "q" });
  assert.deepEqual(names(fourier(2), table), ["cos 1/season", "sin 1/season", "cos 2/season"]);
  const wave = values(fourier(1, 6.5), table);
  agree(
    [wave[0]! - wave[13]!].map((v) => v + 1),
    [1],
    12,
  ); // 13 = 2 × 6.5
});

test("groups, the user's own function and standardising", async () => {
  const table = await regular();
  assert.deepEqual(names(categories("group"), table), ["group: b"]);
  assert.deepEqual(values(categories("group", { base: "b" }), table), [0, 1, 1, 0, 1, 1, 0, 1, 1, 0]);
  assert.deepEqual(
    values(
      own("twice", (r) => 2 * r["x"]),
      table,
    ).slice(0, 3),
    [2, 4, 10],
  );
  const z = values(standardise("x"), table);
  agree(
    [1 + z.reduce((sum, value) => sum + value, 0), z.reduce((sum, value) => sum + value * value, 0)],
    [1, 9],
    12,
  );
});

test("what cannot be meant is refused, with the place and the way out", async () => {
  const table = await regular();
  const refused = (make: () => unknown, pattern: RegExp) =>
    assert.throws(
      () => columnsOf(make() as TermLike, table),
      (error: Error) => error.name === "InputError" && pattern.test(error.message),
    );
  refused(() => lag("x", -1), /whole number from 0 up, not -1/);
  refused(() => lags("x", 3, 1), /last lag \(1\) comes before the first \(3\)/);
  refused(() => log(own("zero", () => 0)), /"zero" is 0 in 2024-W01 \(row 1\), which has no logarithm/);
  refused(() => step("2031-W01"), /does not vary over the table, which spans 2024-W01 to 2024-W10/);
  refused(() => step("sometime"), /step: "sometime" cannot be read as a period/);
  refused(() => categories("grop"), /Did you mean "group"\?/);
  refused(() => categories("group", { base: "c" }), /no group "c"/);
  refused(() => fourier(30), /need a period of at least 60/);
  refused(() => trend(0), /degree/);
  refused(() => "group", /holds text/);
  refused(() => 7, /7 is no term/);
});
