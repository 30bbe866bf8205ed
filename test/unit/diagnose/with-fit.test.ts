// The diagnostics on real fits, from a table to the sentence: labels, seasons and calls come from the table and its index.
import assert from "node:assert/strict";
import { test } from "node:test";
import { classical, neweyWest } from "../../../src/covariance/index.js";
import { load } from "../../../src/data/index.js";
import { lag, log, step } from "../../../src/design/index.js";
import { codeOf, fitCall } from "../../../src/diagnose/checkup/code.js";
import {
  checkup,
  cointegration,
  dependence,
  integration,
  leverage,
  spuriousAlarm,
  stability,
} from "../../../src/diagnose/index.js";
import { estimate } from "../../../src/estimate/index.js";
import { agree, noise } from "./subject.js";

const T = 160;
const month = (t: number) => `${2008 + Math.floor(t / 12)}-${String((t % 12) + 1).padStart(2, "0")}`;
const fare = noise(T, 1).map((v) => 4 + 0.3 * v);
const u = noise(T, 2);
for (let t = 1; t < T; t++) u[t]! += 0.6 * u[t - 1]!;
const rows = Array.from({ length: T }, (_, t) => ({
  month: month(t),
  fare: fare[t]!,
  riders: Math.exp(8 - 0.5 * Math.log(fare[t]!) + 0.05 * u[t]!),
}));

test("a monthly fit: seasonal lags from the index, labels of periods, calls a cell can run", async () => {
  const table = await load(rows, { time: "month" });
  const m = estimate(
    table,
    log("riders"),
    [log("fare"), lag(log("fare"), 1), step("2015-06")],
    {},
    classical(),
  );
  const found = dependence(m);
  assert.equal(found.T, T - 1);
  assert.ok(found.named("Breusch–Godfrey F").some((t) => t.lags === 12 && t.note === "lag 12 alone"));
  assert.ok(found.dependent);
  assert.match(found.finding, /from one month to the next/);
  assert.equal(found.fingerprint, table.fingerprint);
  const card = checkup(m);
  assert.equal(card.coefficient, "log fare");
  assert.equal(
    card.lines.find((line) => line.question === "dependence")?.attempt,
    'covariances(m, undefined, { terms: ["log fare"] })',
  );
  assert.equal(
    fitCall(m, ["trend()"]),
    'fit(table, log("riders"), [log("fare"), lag(log("fare"), 1), step("2015-06"), trend()])',
  );
  assert.match(leverage(m).finding, /^Leaving out 20\d\d-\d\d to 20\d\d-\d\d moves/);
  assert.match(stability(m, { at: "2014-01", draws: 99 }).named("Chow")[0]!.note!, /break at 2014-01/);
  assert.equal(spuriousAlarm(m.regression), undefined);
});

test("leverage counts moves in the standard errors of the estimator that is on", async () => {
  const table = await load(rows, { time: "month" });
  const m = estimate(table, "riders", ["fare"], {}, classical());
  const robust = m.under(neweyWest());
  const ratio = robust.coefficient("fare").se / m.coefficient("fare").se;
  const one = leverage(m).blocks[10]!;
  const other = leverage(robust).blocks[10]!;
  agree(one.moves[1]! / other.moves[1]!, ratio, 10, "ratio of standard errors");
});

test("a lagged outcome is seen through the label; a gap in the table is said", async () => {
  const table = await load(
    rows.filter((_, t) => t < 70 || t > 73),
    { time: "month" },
  );
  const m = estimate(table, "riders", ["fare"], {}, classical());
  assert.ok(dependence(m).remarks.some((r) => r.text.startsWith("4 periods are missing")));
  const whole = await load(rows, { time: "month" });
  const lagged = estimate(whole, "riders", [lag("riders", 1), "fare"], {}, classical());
  assert.ok(
    dependence(lagged)
      .named("Durbin–Watson")
      .every((t) => !t.valid),
  );
  assert.throws(() => integration(table, "fare"), /integration: no row between 2013-10 and 2014-03/);
  assert.equal(integration(whole, "fare").series[0]!.reading, "stationary");
  assert.equal(cointegration(whole, ["riders", "fare"]).residuals[0]!.label, "2008-01");
  assert.throws(() => integration(whole, "fair"), /fare/);
});

test("labels read back as code", () => {
  const columns = new Set(["fare", "log sum", "rain (mm)"]);
  const code = (label: string) => codeOf(label, (name) => columns.has(name));
  assert.equal(code("fare"), '"fare"');
  assert.equal(code("log sum"), '"log sum"');
  assert.equal(code("rain (mm)"), '"rain (mm)"');
  assert.equal(code("log fare (t\u22122)"), 'lag(log("fare"), 2)');
  assert.equal(code("fare (t+1)"), 'lead("fare", 1)');
  assert.equal(code("from 2021-W30"), 'step("2021-W30")');
  assert.equal(code("cos 1/season"), undefined);
});
