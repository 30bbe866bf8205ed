import assert from "node:assert/strict";
import { test } from "node:test";
import { load } from "../../../src/data/index.js";
import { design, lag, lags, own, type TermLike } from "../../../src/design/index.js";

const months = (holes: Record<string, readonly number[]>, T = 24) =>
  load(
    Array.from({ length: T }, (_, i) => ({
      month: `${2020 + Math.floor(i / 12)}-${String((i % 12) + 1).padStart(2, "0")}`,
      ...Object.fromEntries(
        ["y", "x", "z"].map((name, j) => [name, holes[name]?.includes(i) ? null : Math.sin(i * (j + 2))]),
      ),
    })),
    { time: "month" },
  );
const message = async (holes: Record<string, readonly number[]>, terms: TermLike, options = {}) => {
  const table = await months(holes);
  let said = "";
  assert.throws(
    () => design(table, "y", terms, options),
    (error: Error) => {
      said = error.message;
      return error.name === "InputError";
    },
  );
  return said;
};

test("which column, in how many periods, where first, and the ways out", async () => {
  assert.equal(
    await message({ x: [4, 7] }, "x"),
    'fit: "x" is missing in 2 of 24 periods (2020-05, row 5; 2020-08, row 8). Leave these periods out with missing: "leave out", or fill them first with .fill("x", "linear").',
  );
  assert.match(
    await message({ x: [4, 7, 9, 11, 12] }, "x"),
    /in 5 of 24 periods \(first 2020-05, row 5; 2020-08, row 8; 2020-10, row 10\)/,
  );
});

test("lags of a column that is missing are not counted again", async () => {
  const said = await message({ x: [4], z: [6] }, [lags("x", 0, 3), "z"]);
  assert.match(said, /^fit: "x" is missing in 1 of 24 periods \(2020-05, row 5\); "z" is missing in 1 of 24/);
  assert.doesNotMatch(said, /t−1/);
  assert.match(
    await message({ x: [4] }, lag("x")),
    /"x \(t−1\)" is missing in 1 of 24 periods \(2020-06, row 6\)/,
  );
});

test("a column that begins late or ends early: the sample that has it comes first among the ways out", async () => {
  assert.match(
    await message({ x: [0, 1, 2], z: [23] }, ["x", "z"]),
    /Shorten the sample with sample: \["2020-04", "2021-11"\], leave these periods out/,
  );
  assert.doesNotMatch(await message({ x: [0, 1, 5] }, "x"), /Shorten/);
  const all = Array.from({ length: 24 }, (_, i) => i);
  assert.doesNotMatch(await message({ x: all }, "x"), /Shorten/);
});

test("only the periods of the sample count", async () => {
  const table = await months({ x: [0, 20] });
  assert.equal(design(table, "y", "x", { sample: ["2020-02", "2021-06"] }).y.length, 17);
  assert.match(
    await message({ x: [0, 20] }, "x", { sample: ["2020-02", null] }),
    /in 1 of 23 periods \(2021-09, row 21\)/,
  );
});

test("what is no column of the table is not to be filled", async () => {
  const said = await message(
    {},
    own("odd", (_, i) => (i === 3 ? null : i)),
  );
  assert.match(said, /"odd" is missing in 1 of 24 periods/);
  assert.doesNotMatch(said, /fill/);
});
