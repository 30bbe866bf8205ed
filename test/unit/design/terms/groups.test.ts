import assert from "node:assert/strict";
import { test } from "node:test";
import { load } from "../../../../src/data/index.js";
import { categories, own } from "../../../../src/design/index.js";
import { gappedWeeks, names, only, values, weeks } from "../tables.js";

test("a level for each group but the base", async () => {
  const table = await weeks();
  assert.deepEqual(names(categories("group"), table), ["group: b"]);
  assert.equal(only(categories("group"), table).note, "groups of group are measured against a");
  assert.deepEqual(values(categories("group", { base: "b" }), table), [0, 1, 1, 0, 1, 1, 0, 1, 1, 0]);
  assert.deepEqual(names(categories("flag"), table), ["flag: true"]);
  assert.deepEqual(names(categories("flag", { base: true }), table), ["flag: false"]);
});

test("groups named by numbers go in order of number; a missing one is missing", async () => {
  const table = await load(
    [10, 9, 2, null, 10, 9, 2, 2].map((zone, i) => ({ year: 2000 + i, zone })),
    { time: "year" },
  );
  assert.deepEqual(names(categories("zone"), table), ["zone: 9", "zone: 10"]);
  assert.deepEqual(values(categories("zone"), table), [0, 1, 0, NaN, 0, 1, 0, 0]);
});

test("groups that cannot be levels are refused", async () => {
  const table = await weeks();
  assert.throws(() => values(categories("grop"), table), /no column "grop"\. Did you mean "group"\?/);
  assert.throws(() => values(categories("group", { base: "c" }), table), /"group" has no group "c"/);
  assert.throws(() => values(categories("x"), table), /"x" has 10 groups in 10 periods, too many/);
  const one = table.define({ same: () => "a" });
  assert.throws(() => values(categories("same"), one), /one group only, "a"; there is nothing to compare/);
  assert.throws(() => categories("group", "a" as never), /options come in braces/);
});

test("a function of a row knows every column, its period and its place, and what it read", async () => {
  const table = await weeks();
  const made = only(
    own("mine", (r, i) => (r.period === "2024-W03" ? null : r["flag"] ? r["x"] + i : 0)),
    table,
  );
  assert.deepEqual([...made.values].slice(0, 5), [1, 0, NaN, 0, 21]);
  assert.deepEqual(made.uses.map(({ column }) => column).sort(), ["flag", "x"]);
  assert.deepEqual(
    values(
      own("copy", (r) => Object.keys({ ...r }).length),
      table,
    )[0],
    3,
  );
  const filled = (await gappedWeeks()).fill("x", "linear");
  assert.deepEqual(
    [
      ...only(
        own("x2", (r) => r["x"] ** 2),
        filled,
      ).filled!,
    ],
    [0, 0, 0, 1, 1, 0, 0, 0, 0, 0],
  );
});

test("a function of a row that makes text, or reads what is not there, is refused", async () => {
  const table = await weeks();
  assert.throws(
    () =>
      values(
        own("t", (r) => r["group"]),
        table,
      ),
    /own: "t" is no number in 2024-W01 \(row 1\)/,
  );
  assert.throws(
    () =>
      values(
        own("t", (r) => r["fair"]),
        table,
      ),
    /no column "fair"/,
  );
  assert.throws(() => own((() => 1) as never, "a" as never), /own: give a name and a function of a row/);
});
