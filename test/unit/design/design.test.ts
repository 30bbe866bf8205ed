import assert from "node:assert/strict";
import { test } from "node:test";
import { load, mean } from "../../../src/data/index.js";
import {
  categories,
  type Design,
  type DesignOptions,
  design,
  diff,
  lag,
  lags,
  lead,
  log,
  own,
  product,
  rolling,
  seasonal,
  step,
  type TermLike,
} from "../../../src/design/index.js";

const table = (override: Record<number, object> = {}) =>
  load(
    Array.from({ length: 12 }, (_, i) => ({
      month: `2020-${String(i + 1).padStart(2, "0")}`,
      y: i + 1,
      x: (i * 7) % 5,
      z: Math.sin(i),
      note: "n",
      ...override[i],
    })),
    { time: "month" },
  );
const plain = await table();
const texts = ({ remarks }: Design) => remarks.map(({ text }) => text);
const refused = (outcome: TermLike, terms: TermLike, pattern: RegExp, options: object = {}, of = plain) =>
  assert.throws(() => design(of, outcome, terms, options as DesignOptions), {
    name: "InputError",
    message: pattern,
  });

test("the numbers, column by column, the intercept first", () => {
  const made = design(plain, "y", ["x", log("y")], { sample: ["2020-02", "2020-04"], intercept: false });
  assert.deepEqual(made.terms, ["x", "log y"]);
  assert.equal(made.interceptAt, -1);
  assert.deepEqual([...made.X.data], [2, 4, 1, Math.log(2), Math.log(3), Math.log(4)]);
  const whole = design(plain, "y", "x");
  assert.deepEqual([whole.X.rows, whole.X.columns, whole.interceptAt], [12, 2, 0]);
  assert.deepEqual([...whole.X.data].slice(0, 12), Array(12).fill(1));
});

test("periods that a lag or a lead cannot reach fall out and are stated, by the longest lag", () => {
  const made = design(plain, "y", [lags("x", 1, 3), lead("z")]);
  assert.equal(made.y.length, 8);
  assert.deepEqual(made.terms, ["intercept", "x (t−1)", "x (t−2)", "x (t−3)", "z (t+1)"]);
  assert.deepEqual(texts(made), [
    "3 months left out: x (t−3) reaches back before 2020-01",
    "1 month left out: z (t+1) reaches beyond 2020-12",
  ]);
  assert.deepEqual(made.remarks[0]!.severity, "note");
  assert.equal(made.left.length, 4);
  assert.deepEqual([...made.y], [4, 5, 6, 7, 8, 9, 10, 11]);
});

test("lags reach back before the sample", () => {
  const made = design(plain, "y", [lag("y", 2)], { sample: ["2020-03", "2020-06"] });
  assert.deepEqual([...made.X.data].slice(4), [1, 2, 3, 4]);
  assert.deepEqual(texts(made), []);
});

test("missing values that may be left out are left out and counted", async () => {
  const holed = await table({ 4: { x: null }, 7: { x: null, y: null } });
  const made = design(holed, "y", ["x"], { missing: "leave out" });
  assert.equal(made.y.length, 10);
  assert.deepEqual(texts(made), ["2 months left out: x, y are missing in some"]);
  assert.ok(made.remarks.every(({ severity }) => severity === "caution"));
  assert.deepEqual([made.periods[3]! - made.periods[0]!, made.periods[4]! - made.periods[3]!], [3, 2]);
});

test("a gap in the table is stated, apart from what is left out", async () => {
  const rows = [0, 1, 2, 3, 6, 7, 8, 9, 10].map((i) => ({ year: 2000 + i, y: i * i, x: i === 8 ? null : i }));
  const gapped = await load(rows, { time: "year" });
  assert.deepEqual(texts(design(gapped, "y", [])), ["2 years inside the sample are not in the table"]);
  assert.deepEqual(texts(design(gapped, "y", "x", { missing: "leave out" })), [
    "1 year left out: x is missing",
    "2 years inside the sample are not in the table",
  ]);
  refused("y", lag("y"), /The table has no row for 2 years inside its span \(first 2004\)/, {}, gapped);
});

test("periods that rest on filled values are counted, where a lag moves them too", async () => {
  const filled = (await table({ 4: { x: null } })).fill("x", "linear");
  const made = design(filled, "y", ["x", lag("x"), "z"]);
  assert.equal(made.filled, 2);
  assert.match(
    texts(made).join("; "),
    /2 months of those used rest on values that were filled in, not observed \(x\)/,
  );
  assert.equal(design(filled, "y", ["z"]).filled, 0);
  const single = design(filled, "y", "x");
  assert.match(texts(single).join(), /1 month of those used rests on values/);
});

test("the sample is from and to, both included; a year of months is all of it", () => {
  const made = design(plain, "y", ["x"], { sample: ["2020-03", "2020-10"] });
  assert.deepEqual([made.y[0], made.y.at(-1)], [3, 10]);
  assert.equal(design(plain, "y", "x", { sample: [null, "2020-10"] }).y.length, 10);
  assert.equal(design(plain, "y", "x", { sample: [2020, 2020] }).y.length, 12);
  refused("y", "x", /no period lies in the sample 2031-01 to end; the table spans 2020-01 to 2020-12/, {
    sample: ["2031-01", null],
  });
  refused("y", "x", /Its first period comes after its last/, { sample: ["2020-06", "2020-02"] });
  refused("y", "x", /sample is a first and a last period/, { sample: "2020" });
  refused("y", "x", /fit: sample: "spring" cannot be read as a period/, { sample: ["spring", null] });
});

test("whether an earlier value of the outcome is among the terms", () => {
  const lagged = (outcome: TermLike, term: TermLike) => design(plain, outcome, [term]).laggedOutcome;
  assert.equal(lagged("y", lag("y")), true);
  assert.equal(lagged(log("y"), lag(log("y"))), true);
  assert.equal(lagged("y", product(lag("y"), "x")), true);
  assert.equal(lagged("x", diff(lag("x", 2))), true);
  assert.equal(lagged(diff("y", { order: 2 }), lag("y")), true);
  assert.equal(lagged("y", lag(rolling("y", mean, 3))), true);
  assert.equal(
    lagged(
      own("twice", (r) => 2 * r["y"]),
      lag("y"),
    ),
    true,
  );
  assert.equal(lagged(lead("x", 3), "x"), true);
  assert.equal(lagged("y", lag("x")), false);
  assert.equal(lagged("y", lead("x")), false);
});

test("names that clash are refused", async () => {
  const clash = await load(
    [1, 2, 3, 4].map((i) => ({ year: 2000 + i, y: i * i, intercept: i })),
    { time: "year" },
  );
  refused(
    "y",
    "intercept",
    /"intercept" would have the name of the fit's own constant\. Rename it/,
    {},
    clash,
  );
  assert.deepEqual(design(clash, "y", "intercept", { intercept: false }).terms, ["intercept"]);
  refused("y", ["x", "x"], /"x" is given twice/);
  refused("y", ["x", lags("x", 0, 1)], /"x" is given twice/);
  refused("y", ["y"], /outcome "y" is also among the terms/);
  refused("y", lag("y", 0), /outcome "y" is also among the terms/);
});

test("what is not there, is text, or is no series is refused in the name of the fit", () => {
  refused("Y", ["x"], /^fit: the table has no column "Y"\. Did you mean "y"\?$/);
  refused("y", lag("xx"), /^fit: the table has no column "xx"\. Did you mean "x"\?$/);
  refused("y", ["note"], /^fit: column "note" holds text/);
  refused("y", 7 as never, /^fit: 7 is no term/);
  refused("y", [step("2031-01")], /^step: /);
  refused("y", [], /no terms and no intercept/, { intercept: false });
  refused(["y", "x"], ["z"], /outcome must be one series, not 2/);
  refused("y", "x", /no option "intercpt"\. Did you mean "intercept"\?/, { intercpt: false });
  refused("y", "x", /intercept is true or false, not "no"/, { intercept: "no" });
  refused("y", "x", /missing can only be "leave out", not "drop"/, { missing: "drop" });
});

test("infinite values and columns that do not vary over the sample are refused", async () => {
  refused(
    "y",
    own("far", (_, i) => 1 / (i - 5)),
    /"far" is infinite in 2020-06 \(row 6\)/,
  );
  refused(
    "y",
    own("five", () => 5),
    /"five" is constant \(5\) over the periods used .* say intercept: false/,
  );
  assert.equal(
    design(
      plain,
      "y",
      own("five", () => 5),
      { intercept: false },
    ).X.columns,
    1,
  );
  refused(
    "y",
    step("2020-10"),
    /"from 2020-10" is zero in every period used \(2020-01 to 2020-08, every month\)/,
    {
      sample: [null, "2020-08"],
    },
  );
});

test("a level that does not occur in the sample is refused with a way out that keeps the others", async () => {
  const grouped = await load(
    Array.from({ length: 30 }, (_, i) => ({
      year: 1990 + i,
      y: (i * i) % 7,
      g: i < 10 ? "a" : i < 20 ? "b" : "c",
    })),
    { time: "year" },
  );
  refused(
    "y",
    categories("g"),
    /"g: c" is zero in every period used .* Cut the table to the sample first/,
    {
      sample: [null, 2005],
    },
    grouped,
  );
  assert.deepEqual(design(grouped.between(undefined, 2005), "y", categories("g")).terms, [
    "intercept",
    "g: b",
  ]);
  const autumnless = await load(
    Array.from({ length: 30 }, (_, i) => ({
      m: `20${10 + Math.floor(i / 10)}-${String((i % 10) + 1).padStart(2, "0")}`,
      y: i * i,
    })),
    { time: "m", every: "month" },
  );
  refused(
    "y",
    seasonal(),
    /"November" is zero in every period used .* a sample that has every season/,
    {},
    autumnless,
  );
});

test("no more periods than coefficients are refused, with why there are so few", async () => {
  refused("y", ["x", "z"], /3 periods for 3 coefficients\. A fit needs more periods/, {
    sample: ["2020-01", "2020-03"],
  });
  refused(
    "y",
    ["x", lag("z", 10)],
    /2 periods \(10 left out: z \(t−10\) reaches back before 2020-01, \.\.\.\) for 3/,
  );
  const empty = await table(Object.fromEntries(Array.from({ length: 12 }, (_, i) => [i, { x: null }])));
  refused("y", "z", /1 period for 2 coefficients/, { sample: ["2020-01", "2020-01"] }, empty);
});
