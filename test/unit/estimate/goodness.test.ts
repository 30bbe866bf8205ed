import assert from "node:assert/strict";
import { test } from "node:test";
import { load } from "../../../src/data/index.js";
import { design, own, type TermLike } from "../../../src/design/index.js";
import { Goodness } from "../../../src/estimate/goodness.js";
import { regress } from "../../../src/estimate/index.js";
import { agree } from "../../support/digits.js";

const table = await load(
  [3, 1, 4, 1, 5, 9, 2, 6].map((y, i) => ({ year: 2000 + i, y, x: i * i })),
  { time: "year" },
);
const of = (terms: TermLike, intercept = true, outcome: TermLike = "y") =>
  new Goodness(regress(design(table, outcome, terms, { intercept })));

test("R² about the mean with a constant among the columns, about zero without", () => {
  // By hand: Σy = 31, Σy² = 173, Σx = 140, Σx² = 4676, Σxy = 697.
  const slope = (697 - (140 * 31) / 8) / (4676 - (140 * 140) / 8);
  const explained = slope * (697 - (140 * 31) / 8);
  agree([of("x").rSquared.value], [explained / (173 - (31 * 31) / 8)], 14);
  assert.equal(of("x").rSquared.about, "mean");
  agree([of("x", false).rSquared.value], [(697 * 697) / 4676 / 173], 14);
  assert.equal(of("x", false).rSquared.about, "zero");
  const halves = [own("early", (_, i) => i < 4), own("late", (_, i) => i >= 4)];
  assert.equal(of(halves, false).rSquared.about, "mean"); // a full set of levels spans the constant
});

test("log-likelihood, AIC and BIC by their definition", () => {
  const rss = 173 - (31 * 31) / 8;
  const likelihood = -4 * (Math.log(2 * Math.PI) + Math.log(rss / 8) + 1);
  const found = of([]);
  agree(
    [found.logLikelihood, found.aic, found.bic],
    [likelihood, 4 - 2 * likelihood, 2 * Math.log(8) - 2 * likelihood],
    14,
  );
});

test("a fit that is exact to rounding is perfect, and an outcome that does not vary has no R²", () => {
  assert.equal(of("x").perfect, false);
  assert.equal(
    of(
      "x",
      true,
      own("w", (r) => r["x"] / 3 + 0.1),
    ).perfect,
    true,
  );
  const flat = of(
    "x",
    true,
    own("w", () => 5),
  );
  assert.equal(flat.perfect, true);
  assert.equal(Number.isNaN(flat.rSquared.value), true);
});
