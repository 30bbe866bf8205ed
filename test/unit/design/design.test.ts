import assert from "node:assert/strict";
import { test } from "node:test";
import { load } from "../../../src/data/index.js";
import { type Design, design, lag, lead, log, type TermLike } from "../../../src/design/index.js";

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
const texts = ({ remarks }: Design) => remarks.map(({ text }) => text);

test("periods that a lag or a lead cannot reach fall out and are stated", async () => {
  const made = design(await table(), "y", [lag("x", 2), lead("z")]);
  assert.equal(made.y.length, 9);
  assert.deepEqual(made.terms, ["intercept", "x (t−2)", "z (t+1)"]);
  assert.deepEqual(texts(made), [
    "2 months left out: x (t−2) reaches beyond the table",
    "1 month left out: z (t+1) reaches beyond the table",
  ]);
  assert.equal(made.left.length, 3);
  assert.deepEqual([...made.y], [3, 4, 5, 6, 7, 8, 9, 10, 11]);
});

test("a missing value inside the sample is refused, or left out and counted when asked", async () => {
  const holed = await table({ 4: { x: null }, 7: { x: null } });
  assert.throws(() => design(holed, "y", ["x"]), {
    name: "InputError",
    message:
      'fit: "x" is missing in 2 of 12 periods (2020-05, row 5; 2020-08, row 8). Leave these periods out with missing: "leave out", or fill them first with .fill("x", "linear").',
  });
  const made = design(holed, "y", ["x"], { missing: "leave out" });
  assert.equal(made.y.length, 10);
  assert.match(
    texts(made).join("; "),
    /2 months left out: x is missing; 2 months inside the sample are not used/,
  );
});

test("filled values are counted", async () => {
  const filled = (await table({ 4: { x: null } })).fill("x", "linear");
  const made = design(filled, "y", ["x", lag("x")]);
  assert.equal(made.filled, 1);
  assert.match(texts(made).join("; "), /1 of the values used were filled in/);
});

test("the sample is from and to, both included, and either end may be open", async () => {
  const made = design(await table(), "y", ["x"], { sample: ["2020-03", "2020-10"] });
  assert.deepEqual([made.y[0], made.y.at(-1)], [3, 10]);
  assert.equal(design(await table(), "y", ["x"], { sample: [null, "2020-10"] }).y.length, 10);
  await assert.rejects(
    async () => design(await table(), "y", ["x"], { sample: ["2031-01", null] }),
    /no period lies in the sample/,
  );
});

test("whether the outcome's own past is among the terms", async () => {
  assert.equal(design(await table(), "y", [lag("y")]).laggedOutcome, true);
  assert.equal(design(await table(), log("y"), [lag(log("y"))]).laggedOutcome, true);
  assert.equal(design(await table(), "y", [lag("x")]).laggedOutcome, false);
  assert.equal(design(await table(), "y", [lead("y")]).laggedOutcome, false);
});

test("clashing, doubled and absent names are refused", async () => {
  const clash = await load(
    [1, 2, 3, 4].map((i) => ({ year: 2000 + i, y: i * i, intercept: i })),
    { time: "year" },
  );
  assert.throws(() => design(clash, "y", ["intercept"]), /would clash/);
  assert.deepEqual(design(clash, "y", ["intercept"], { intercept: false }).terms, ["intercept"]);
  const plain = await table();
  const refused = (outcome: TermLike, terms: TermLike[], pattern: RegExp, options = {}) =>
    assert.throws(
      () => design(plain, outcome, terms, options),
      (error: Error) => error.name === "InputError" && pattern.test(error.message),
    );
  refused("y", ["x", "x"], /"x" is given twice/);
  refused("y", ["y"], /outcome "y" is also among the terms/);
  refused("Y", ["x"], /no column "Y"\. Did you mean "y"\?/);
  refused("y", ["note"], /"note" holds text/);
  refused("y", [], /no terms and no intercept/, { intercept: false });
  refused(["y", "x"] as never, ["z"], /outcome must be one series/);
});
