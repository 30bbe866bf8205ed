import assert from "node:assert/strict";
import { test } from "node:test";
import { classical, neweyWest, white } from "../../../../src/covariance/index.js";
import { load } from "../../../../src/data/index.js";
import { estimate, type Fit } from "../../../../src/estimate/index.js";
import { counterRandom } from "../../../../src/numeric/index.js";
import { recordType, tableOf } from "../../../../src/show/index.js";
import { estimatorFacts } from "../../../../src/show/presenters/estimator-facts.js";
import { shown } from "../all-kinds.js";

/** Yearly y = 2 + slopes·x + noise, with as many terms as slopes. */
async function simple(slopes: readonly number[], noise = 1): Promise<Fit> {
  const random = counterRandom(3, 0);
  const rows = Array.from({ length: 60 }, (_, t) => {
    const xs = slopes.map(() => random.normal());
    const y = xs.reduce((sum, x, j) => sum + x * slopes[j]!, 2 + noise * random.normal());
    return { year: 1950 + t, y, ...Object.fromEntries(xs.map((x, j) => [`x${j + 1}`, x])) };
  });
  const table = await load(rows, { time: "year" });
  return estimate(
    table,
    "y",
    slopes.map((_, j) => `x${j + 1}`),
    {},
    classical(),
  );
}

async function lines(m: Fit): Promise<string[]> {
  return ((await shown(m))["text/plain"] as string).split("\n");
}

test("the line on top says what it is", async () => {
  const [first] = await lines(await simple([3]));
  assert.equal(first, "y · 1950 to 2009, every year · 60 periods · 2 coefficients · classical");
});

test("the finding names the terms whose intervals exclude zero", async () => {
  const finding = async (m: Fit) => (await lines(m))[2];
  assert.equal(await finding(await simple([3, -3])), "The 95% intervals of x1 and x2 exclude zero.");
  assert.equal(
    await finding(await simple([3, 0])),
    "The 95% interval of x1 excludes zero; that of x2 does not.",
  );
  assert.equal(
    await finding(await simple([0, 0, 3])),
    "The 95% interval of x3 excludes zero; those of x1 and x2 do not.",
  );
  assert.equal(await finding((await simple([0])).at(0.9)), "The 90% interval of x1 holds zero.");
  assert.equal(await finding(await simple([])), "No terms beside the intercept.");
});

test("every figure in the table is the fit's own, to the decimals that its standard error justifies", async () => {
  const m = await simple([3, 0.02]);
  const table = tableOf(m);
  assert.deepEqual(
    table.columns.map(({ key }) => key),
    ["term", "estimate", "se", "low", "high", "p"],
  );
  table.rows.forEach((row, j) => {
    const { term, estimate: value, se, low, high, p } = m.coefficients[j]!;
    assert.deepEqual(
      row.map((cell) => cell.value),
      [term, value, se, low, high, p],
    );
    const decimals = (text: string) => text.split(".")[1]?.length ?? 0;
    const [, e, s, l, h] = row.map((cell) => cell.text);
    assert.equal(new Set([e, s, l, h].map((text) => decimals(text!))).size, 1);
    assert.ok(Math.abs(Number(e!.replace("−", "-")) - value) <= se / 10);
  });
});

test("the record holds the figures at full precision, the specification, fingerprint and versions", async () => {
  const m = (await simple([3])).under(neweyWest());
  const record = JSON.parse(JSON.stringify((await shown(m))[recordType])) as {
    kind: string;
    fingerprint: string;
    value: { coefficients: Record<string, number>[]; specification: object; estimator: { label: string } };
  };
  assert.equal(record.kind, "fit");
  assert.equal(record.fingerprint, m.fingerprint);
  assert.deepEqual(record.value.specification, m.specification);
  assert.equal(record.value.estimator.label, m.covariance.label);
  m.coefficients.forEach((row, j) => {
    const held = record.value.coefficients[j]!;
    assert.equal(held["estimate"], row.estimate);
    assert.equal(held["se"], row.se);
    assert.equal(held["p"], row.p);
  });
});

test("the same fit shows the same bytes", async () => {
  const m = await simple([3, 0]);
  assert.equal(JSON.stringify(await shown(m)), JSON.stringify(await shown(m.under(classical()))));
});

test("a perfect fit says so and shows no intervals", async () => {
  const m = await simple([3], 0);
  const text = await lines(m);
  assert.equal(text[2], "The terms give y to rounding.");
  assert.match(text.join("\n"), /Caution: the fit is perfect/);
  assert.match(text.join("\n"), /^x1 +3\.\d+ +– +– +– +–$/m);
});

test("what an estimator chose and found is listed, single terms on one line", async () => {
  const m = (await simple([3])).under(white("HC3"));
  assert.deepEqual(estimatorFacts(m.covariance.details)[0], ["Type", "HC3"]);
  assert.deepEqual(
    estimatorFacts({ b: 0.08, prewhitened: false, "rho: a": 0.5, "rho: b": -0.25, other: null }),
    [
      ["Bandwidth over periods, b", "0.08"],
      ["Prewhitened", "no"],
      ["other", "none"],
      ["Autocorrelation of the scores", "a 0.5, b −0.25"],
    ],
  );
});
