import assert from "node:assert/strict";
import { test } from "node:test";
import { classical, fit, iid, lag, load, neweyWest, own, trend, white } from "../../../src/index.js";
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

test("without a constant R² is about zero; a full set of levels counts as a constant", () => {
  assert.equal(fit(table, "y", ["x"], { intercept: false }).rSquared.about, "zero");
  assert.equal(fit(table, "y", ["x"]).rSquared.about, "mean");
  const halves = [own("early", (_, i) => i < 20), own("late", (_, i) => i >= 20)];
  assert.equal(fit(table, "y", halves, { intercept: false }).rSquared.about, "mean");
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
  refused(() => fit(table, "y", ["x"], { errors: { kind: "other" } as never }), /errors must be/);
  refused(
    () => fit(table.define({ w: (r) => 2 * r["x"] - r["z"] }), "y", ["x", "z", "w"]),
    /depend on one another/,
  );
  refused(() => fit(table.define({ c: () => 3 }), "y", ["c"]), /"c" is constant \(3\)/);
  refused(() => fit(table.define({ c: () => 0 }), "y", ["c"]), /"c" is zero in every period/);
});
