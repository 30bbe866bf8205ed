import assert from "node:assert/strict";
import { before, test } from "node:test";
import {
  bandwidthPath,
  type Covariances,
  classical,
  cosine,
  covariances,
  hac,
  neweyWest,
  white,
} from "../../../../src/covariance/index.js";
import { load } from "../../../../src/data/index.js";
import { estimate, type Fit } from "../../../../src/estimate/index.js";
import { counterRandom } from "../../../../src/numeric/index.js";
import { chart, tableOf } from "../../../../src/show/index.js";
import { shown } from "../all-kinds.js";
import { faults } from "../markup.js";

const estimators = [
  classical(),
  ...(["HC0", "HC1", "HC2", "HC3"] as const).map((type) => white(type)),
  ...[1, 2, 3, 4, 5, 6].map((lags) => neweyWest({ lags })),
  ...[8, 12, 16].map((terms) => cosine({ terms })),
  hac({ kernel: "truncated", bandwidth: 2 }),
];
let m: Fit;
let compared: Covariances;

before(async () => {
  const random = counterRandom(11, 0);
  let error = 0;
  const rows = Array.from({ length: 240 }, (_, t) => {
    const xs = Array.from({ length: 30 }, () => random.normal());
    error = 0.6 * error + random.normal();
    const y = xs.reduce((sum, x, j) => sum + 0.02 * j * x, error);
    return {
      month: `${2000 + Math.floor(t / 12)}-${String((t % 12) + 1).padStart(2, "0")}`,
      y,
      ...Object.fromEntries(xs.map((x, j) => [`x${j}`, x])),
    };
  });
  const table = await load(rows, { time: "month" });
  m = estimate(
    table,
    "y",
    Array.from({ length: 30 }, (_, j) => `x${j}`),
    {},
    neweyWest(),
  );
  compared = covariances(m, estimators);
});

test("fifteen estimators by thirty coefficients: one row each, details folded, the changing ones open", async () => {
  assert.equal(compared.estimators.length, 15);
  assert.equal(compared.coefficients.length, 31);
  const markup = (await shown(compared))["text/html"] as string;
  assert.deepEqual(faults(markup), []);
  assert.equal(markup.match(/<details/g)!.filter(Boolean).length >= 12, true);
  const changing = compared.coefficients.slice(0, 12).filter(({ holds }) => holds === "some").length;
  const open = markup.match(/<details open/g)?.length ?? 0;
  assert.equal(open, changing > 0 ? Math.min(3, changing) : 1);
  assert.ok(markup.length < 500_000, `${markup.length} characters`);
});

test("the plain text has every figure of every estimator", async () => {
  const plain = (await shown(compared))["text/plain"] as string;
  for (const { term } of compared.coefficients) {
    assert.match(plain, new RegExp(`^${term}: differs from zero under |^${term}, estimate `, "m"));
  }
  assert.equal(plain.match(/^8 equal-weighted cosines /gm)!.length, 31);
});

test("the table of all intervals has a row per coefficient and estimator, with the comparison's own values", () => {
  const table = tableOf(compared, "intervals");
  assert.equal(table.rows.length, 31 * 15);
  const first = compared.coefficients[0]!;
  assert.deepEqual(
    table.rows[3]!.slice(2, 7).map((cell) => cell.value),
    [
      first.intervals[3]!.se,
      first.intervals[3]!.ratio,
      first.intervals[3]!.low,
      first.intervals[3]!.high,
      first.intervals[3]!.p,
    ],
  );
});

test("a coefficient's estimators are written to common decimals", () => {
  const rows = tableOf(compared, "intervals").rows.slice(0, 15);
  const decimals = rows.map((row) => row[2]!.text.split(".")[1]?.length ?? 0);
  assert.equal(new Set(decimals).size, 1);
});

test("the chart draws the first eight, or the one that is asked for", () => {
  const drawn = (spec: unknown) =>
    new Set((spec as { data: { values: { s: string }[] } }).data.values.map(({ s }) => s));
  assert.equal(drawn(chart(compared).spec).size, 8);
  assert.match(chart(compared).description, /23 more coefficients not drawn/);
  assert.deepEqual([...drawn(chart(compared, "intervals", "x7").spec)], ["x7"]);
});

test("a comparison of no coefficient, and one whose estimators all refuse, are shown", async () => {
  const none = covariances(m, estimators, { terms: [] });
  assert.equal(tableOf(none, "intervals").rows.length, 0);
  assert.deepEqual(faults((await shown(none))["text/html"] as string), []);
  const refused = covariances(m, [neweyWest({ lags: 100_000 })]);
  const bundle = await shown(refused);
  assert.match(bundle["text/plain"] as string, /no interval/);
  assert.deepEqual(faults(bundle["text/html"] as string), []);
  assert.doesNotMatch(bundle["text/plain"] as string, /NaN|Infinity/);
});

test("a bandwidth path marks each rule's choice", async () => {
  const path = bandwidthPath(m, "x29");
  const table = tableOf(path);
  assert.equal(table.rows.length, path.marks.length);
  assert.equal(table.rows[0]![2]!.value, path.marks[0]!.se);
  assert.equal(tableOf(path, "path").rows.length, path.bandwidths.length);
  assert.match(chart(path).description, /classical/);
  assert.deepEqual(faults((await shown(path))["text/html"] as string), []);
});
