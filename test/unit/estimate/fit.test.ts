import assert from "node:assert/strict";
import { test } from "node:test";
import { estimate } from "../../../src/estimate/index.js";
import { classical, fit, iid, lag, load, neweyWest, step, trend, white } from "../../../src/index.js";
import { agree } from "../../support/digits.js";

const rows = Array.from({ length: 40 }, (_, i) => ({
  q: `${2000 + Math.floor(i / 4)}Q${(i % 4) + 1}`,
  y: Math.cos(i) * 3 + i,
  x: Math.sin(3 * i),
  z: (i * i) % 17,
}));
const table = await load(rows, { time: "q" });

test("another estimator or level changes the judgement and re-estimates nothing", () => {
  const m = fit(table, "y", ["x", "z"]);
  const other = m.under(white("HC3"));
  assert.equal(other.regression, m.regression);
  assert.notEqual(other.coefficient("x").se, m.coefficient("x").se);
  assert.equal(m.estimator.kind, neweyWest().kind);
  const wide = m.at(0.99);
  assert.ok(wide.coefficient("x").high > m.coefficient("x").high);
  assert.equal(wide.coefficient("x").p, m.coefficient("x").p);
});

test("fitted and residuals add up to the outcome, over the periods used", () => {
  const m = fit(table, "y", [lag("x"), trend()]);
  assert.equal(m.T, 39);
  assert.equal(m.periods[0], "2000Q2");
  agree(
    m.fitted.map((value, t) => value + m.residuals[t]!),
    m.regression.y,
    14,
  );
});

test("a coefficient is found by its label, with a hyphen for the minus sign, or by its term", () => {
  const m = fit(table, "y", [lag("x"), step("2005Q1"), trend(2)]);
  const wanted = m.coefficients[1];
  assert.equal(m.coefficient("x (t\u22121)"), wanted);
  assert.equal(m.coefficient("x (t-1)"), wanted);
  assert.equal(m.coefficient(lag("x")), wanted);
  assert.equal(m.coefficient(step("2005-02-01")), m.coefficient("from 2005Q1"));
  assert.throws(() => m.coefficient(trend(2)), /trend, trend² are 2 terms; name one of them/);
});

test("a fit cannot be changed, nor its numbers by way of what it hands out", () => {
  const m = fit(table, "y", ["x", "z"]);
  assert.throws(() => {
    (m as { level: number }).level = 0.5;
  }, TypeError);
  const before = m.regression.residuals[0];
  m.residuals.sort();
  assert.equal(m.regression.residuals[0], before);
  assert.throws(() => (m.coefficients as unknown[]).pop(), TypeError);
  assert.throws(() => (m.periods as string[]).pop(), TypeError);
  const other = m.under(white("HC3"));
  assert.equal(other.fitted, m.fitted);
  assert.equal(m.periods.length, m.T);
});

test("a perfect fit gives its coefficients, a caution, and no standard errors", () => {
  const m = fit(table.define({ w: (r) => 2 * r["x"] + 1 }), "w", ["x", "z"]);
  agree(
    m.coefficients.slice(0, 2).map(({ estimate }) => estimate),
    [1, 2],
    15,
  );
  assert.ok(m.coefficients.every(({ se, p, low }) => [se, p, low].every(Number.isNaN)));
  assert.match(m.remarks.map(({ text }) => text).join(), /perfect to rounding/);
  assert.throws(() => m.covariance, /perfect to rounding/);
  assert.equal(m.perfect, true);
});

test("remarks: of the design, of terms that nearly depend on one another, of what watches", () => {
  const near = table.define({ w: (r) => r["x"] + 1e-9 * r["z"] });
  const m = fit(near, "y", ["x", "w", lag("z")], { covariance: classical() });
  const texts = m.remarks.map(({ text }) => text);
  assert.equal(texts[0], "1 quarter left out: z (t−1) reaches back before 2000Q1");
  assert.ok(
    texts.some((text) => /nearly depend on one another \(condition number \d\.\de\+\d+\)/.test(text)),
  );
  const seen: number[] = [];
  const watched = estimate(table, "y", "x", {}, classical(), [
    ({ T }) => {
      seen.push(T);
      return { severity: "note", text: "seen" };
    },
  ]);
  assert.equal(seen.length, 0);
  assert.ok(watched.remarks.some(({ text }) => text === "seen"));
  assert.ok(watched.under(white("HC1")).remarks.some(({ text }) => text === "seen"));
  assert.equal(seen.length, 1);
});

test("the record holds everything as JSON, missing numbers as null", () => {
  const record = JSON.parse(JSON.stringify(fit(table, "y", ["x"])));
  assert.equal(record.kind, "fit");
  assert.deepEqual(record.specification, {
    outcome: "y",
    terms: ["x"],
    intercept: true,
    sample: ["2000Q1", "2009Q4"],
    errors: "iid",
  });
  assert.equal(record.coefficients[1].term, "x");
  assert.equal(record.fingerprint, table.fingerprint);
  const perfect = JSON.parse(JSON.stringify(fit(table.define({ w: (r) => 2 * r["x"] + 1 }), "w", ["x"])));
  assert.equal(perfect.coefficients[1].se, null);
  agree([perfect.coefficients[1].estimate], [2], 15);
});

test("bad requests say what to do", () => {
  const refused = (make: () => unknown, pattern: RegExp) =>
    assert.throws(make, (error: Error) => error.name === "InputError" && pattern.test(error.message));
  const m = fit(table, "y", ["x"], { covariance: classical(), errors: iid() });
  refused(() => m.coefficient("xx"), /no term "xx"\. Did you mean "x"\?/);
  refused(() => m.at(95), /between 0 and 1, not 95\. Did you mean 0\.95\?/);
  refused(() => m.under(white as never), /under: a covariance estimator is wanted.* Call it: white\(\)/);
  refused(() => m.under("HC3" as never), /under: a covariance estimator is wanted/);
  refused(() => fit(table, "y", ["x"], { errors: { kind: "other" } as never }), /errors must be/);
  refused(
    () => fit(table, "y", ["x"], { covariance: "HC3" as never }),
    /fit: a covariance estimator is wanted/,
  );
  refused(() => fit(table, "y", ["x"], { lvel: 0.9 } as never), /no option "lvel"\. Did you mean "level"\?/);
  refused(() => fit(table, "y", ["x"], classical() as never), /fit: there is no option "kind"/);
  refused(
    () => fit(table.define({ w: (r) => 2 * r["x"] - r["z"] }), "y", ["x", "z", "w"]),
    /depend on one another/,
  );
  refused(() => fit(table.define({ c: () => 3 }), "y", ["c"]), /"c" is constant \(3\)/);
  refused(() => fit(table.define({ c: () => 0 }), "y", ["c"]), /"c" is zero in every period/);
});
